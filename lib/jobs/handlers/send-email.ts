import { sendEmail } from "@/lib/email/transport";
import type { JobPayload } from "../definitions";

/** Hands one letter to the mail server. */
export function handleSendEmail(email: JobPayload<"send-email">): Promise<void> {
  return sendEmail(email);
}

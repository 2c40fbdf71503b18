import { createTransport, type Transporter } from "nodemailer";
import type { Email } from "./email";

let current: Transporter | undefined;

/**
 * Sends one message over SMTP. Called by job handlers only, so that a slow or dead mail server never holds up a request.
 * Throws when the server refuses or can't be reached; the queue then tries again.
 */
export async function sendEmail(email: Email): Promise<void> {
  await transporter().sendMail({ from: process.env.MAIL_FROM ?? "Saddlemark <saddlemark@localhost>", ...email });
}

/** Lets go of the connection; for the worker's end. */
export function closeTransport(): void {
  current?.close();
  current = undefined;
}

function transporter(): Transporter {
  const url = process.env.SMTP_URL;
  if (!url) throw new Error("SMTP_URL is not set.");
  return (current ??= createTransport({ url, connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 30_000 }));
}

import { z } from "zod";

/** One message, ready to be sent; the body both as text and as HTML. */
export const emailSchema = z.strictObject({
  to: z.email(),
  subject: z.string().min(1).max(200),
  text: z.string().min(1),
  html: z.string().min(1),
});
export type Email = z.infer<typeof emailSchema>;

import { createHmac } from "node:crypto";

/** Names of the headers that go with every message. */
export const webhookHeaders = {
  event: "saddlemark-event",
  /** Stays the same when a message is tried again: a receiver knows repeats by it. */
  delivery: "saddlemark-delivery",
  /** Unix seconds of this attempt; a receiver refuses old ones, so that a message caught on its way can't be sent again later. */
  timestamp: "saddlemark-timestamp",
  signature: "saddlemark-signature",
} as const;

/** HMAC-SHA256 (RFC 2104) over "<timestamp>.<body>" with the webhook's secret, in lower-case hexadecimal. */
export function signWebhook({ secret, timestamp, body }: { secret: string; timestamp: string; body: string }): string {
  return createHmac("sha256", secret).update(`${timestamp}.${body}`).digest("hex");
}

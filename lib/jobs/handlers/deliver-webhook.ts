import { findDelivery, recordAttempt, type DeliveryJob } from "@/db/queries/webhooks";
import { withSystemTeam } from "@/db/scope";
import { AppError } from "@/lib/shared/app-error";
import { systemClock } from "@/lib/shared/clock";
import { resolveDestination } from "@/lib/use-cases/webhooks/check-address";
import { jobDefinitions, type JobPayload } from "../definitions";
import { postWebhook } from "./post-webhook";
import { signWebhook, webhookHeaders } from "./sign-webhook";

type Attempt = { delivered: boolean; answer: string };

/**
 * Sends one message to a webhook and keeps what came of it. The address is checked anew, because a name may lead elsewhere by now.
 * Throws when it was not taken, so that the queue tries again; after the last try the delivery is given up.
 */
export async function handleDeliverWebhook({ teamId, deliveryId: id }: JobPayload<"deliver-webhook">): Promise<void> {
  const delivery = await withSystemTeam(teamId, (db) => findDelivery(db, { teamId, id }));
  // Deleted with its webhook, or done before a worker was cut off.
  if (delivery === null || delivery.status !== "waiting") return;
  if (!delivery.enabled) return withSystemTeam(teamId, (db) => recordAttempt(db, { teamId, id, status: "given-up", lastAnswer: "The webhook was switched off." }));
  const { delivered, answer } = await attempt(delivery);
  const last = delivery.attempts >= jobDefinitions["deliver-webhook"].retryLimit;
  const status = delivered ? "delivered" : last ? "given-up" : "waiting";
  await withSystemTeam(teamId, (db) => recordAttempt(db, { teamId, id, status, lastAnswer: answer }));
  if (status === "waiting") throw new Error(`not taken: ${answer}`);
}

async function attempt(delivery: DeliveryJob): Promise<Attempt> {
  const body = JSON.stringify({ id: delivery.id, event: delivery.event, at: delivery.createdAt.toISOString(), data: delivery.payload });
  const timestamp = String(Math.floor(systemClock().getTime() / 1000));
  try {
    const destination = await resolveDestination(delivery.url);
    const status = await postWebhook({ destination, body, headers: headersOf(delivery, timestamp, body) });
    const redirect = status >= 300 && status < 400;
    return { delivered: status >= 200 && status < 300, answer: redirect ? `HTTP ${status}; redirects are not followed` : `HTTP ${status}` };
  } catch (error) {
    return { delivered: false, answer: failureText(error) };
  }
}

function headersOf(delivery: DeliveryJob, timestamp: string, body: string): Record<string, string> {
  return {
    "content-type": "application/json; charset=utf-8",
    "user-agent": "Saddlemark-Webhook",
    [webhookHeaders.event]: delivery.event,
    [webhookHeaders.delivery]: delivery.id,
    [webhookHeaders.timestamp]: timestamp,
    [webhookHeaders.signature]: `hmac-sha256=${signWebhook({ secret: delivery.secret, timestamp, body })}`,
  };
}

/** What a person may see of a failed attempt: our own refusals, and of the network its code only. */
function failureText(error: unknown): string {
  if (error instanceof AppError) return error.message;
  if (!(error instanceof Error)) return "failed";
  if (error.name === "TimeoutError" || error.name === "AbortError") return "No answer within ten seconds";
  const code = "code" in error && typeof error.code === "string" ? error.code : error.name;
  return `Not reached (${code})`;
}

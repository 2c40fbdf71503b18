import { z } from "zod";
import { defineOperation } from "../operation";
import { idParams, instantSchema, listOf, pageQuery, personSchema } from "./common";

export const webhookEvents = ["run.recorded", "edition.published"] as const;
export type WebhookEvent = (typeof webhookEvents)[number];

export const webhookStatuses = ["waiting", "delivered", "given-up"] as const;

const url = z.string().trim().max(2000, "An address has at most 2000 characters.");
const events = z.array(z.enum(webhookEvents)).min(1, "Choose at least one event.").max(10);

export const newWebhookSchema = z.strictObject({ url, events });
export const webhookChangeSchema = z.strictObject({ url: url.optional(), events: events.optional(), enabled: z.boolean().optional() });

export const webhookSchema = z.object({
  id: z.string(),
  url: z.string(),
  events: z.array(z.enum(webhookEvents)),
  enabled: z.boolean(),
  createdBy: personSchema,
  createdAt: instantSchema,
});
export type WebhookView = z.infer<typeof webhookSchema>;

/** The secret is in this answer and in no other. */
export const webhookMadeSchema = webhookSchema.extend({ secret: z.string() });
export type WebhookMade = z.infer<typeof webhookMadeSchema>;

export const deliverySchema = z.object({
  id: z.string(),
  event: z.enum(webhookEvents),
  status: z.enum(webhookStatuses),
  attempts: z.int(),
  /** What the last attempt met, such as "HTTP 500"; null before the first. */
  lastAnswer: z.string().nullable(),
  createdAt: instantSchema,
  deliveredAt: instantSchema.nullable(),
});
export type DeliveryView = z.infer<typeof deliverySchema>;

export const webhookOperations = {
  listWebhooks: defineOperation({
    id: "listWebhooks",
    method: "GET",
    path: "/api/v1/webhooks",
    tag: "Webhooks",
    summary: "Addresses told of events, the oldest first",
    permission: "team:manage",
    query: pageQuery,
    response: { kind: "json", schema: listOf(webhookSchema) },
  }),
  createWebhook: defineOperation({
    id: "createWebhook",
    method: "POST",
    path: "/api/v1/webhooks",
    tag: "Webhooks",
    summary: "Tell an address of events; the answer holds the secret that signs them, this once",
    permission: "team:manage",
    body: { kind: "json", schema: newWebhookSchema },
    status: 201,
    response: { kind: "json", schema: webhookMadeSchema },
  }),
  updateWebhook: defineOperation({
    id: "updateWebhook",
    method: "PATCH",
    path: "/api/v1/webhooks/{id}",
    tag: "Webhooks",
    summary: "Change a webhook's address or events, or switch it off and on",
    permission: "team:manage",
    params: idParams,
    body: { kind: "json", schema: webhookChangeSchema },
    response: { kind: "json", schema: webhookSchema },
  }),
  deleteWebhook: defineOperation({
    id: "deleteWebhook",
    method: "DELETE",
    path: "/api/v1/webhooks/{id}",
    tag: "Webhooks",
    summary: "Delete a webhook with the list of its deliveries",
    permission: "team:manage",
    params: idParams,
    response: { kind: "json", schema: z.object({ id: z.string() }) },
  }),
  listDeliveries: defineOperation({
    id: "listDeliveries",
    method: "GET",
    path: "/api/v1/webhooks/{id}/deliveries",
    tag: "Webhooks",
    summary: "What was sent to a webhook and what it answered, the newest first",
    permission: "team:manage",
    params: idParams,
    query: pageQuery,
    response: { kind: "json", schema: listOf(deliverySchema) },
  }),
};

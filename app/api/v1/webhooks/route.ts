import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { createWebhook } from "@/lib/use-cases/webhooks/create-webhook";
import { listWebhooks } from "@/lib/use-cases/webhooks/list-webhooks";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listWebhooks, listWebhooks, { input: ({ query }) => query, answer: (content) => ({ content }) }),
  POST: apiRoute(operations.createWebhook, createWebhook, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});

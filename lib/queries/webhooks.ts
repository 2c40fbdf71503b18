import { queryOptions } from "@tanstack/react-query";
import type { DeliveryView, WebhookView } from "@/lib/api/contract/webhooks";
import { callApi } from "./call-api";

export const webhookKeys = { all: ["webhooks"] as const, deliveries: (id: string) => ["webhooks", id, "deliveries"] as const };

/** All webhooks of the team; a team has at most twenty. */
export function webhooksQuery() {
  return queryOptions({
    queryKey: webhookKeys.all,
    queryFn: async ({ signal }) => (await callApi<{ items: WebhookView[] }>("/webhooks?limit=200", { signal })).items,
    staleTime: 60_000,
  });
}

/** The latest deliveries of one webhook. */
export function deliveriesQuery(id: string) {
  return queryOptions({
    queryKey: webhookKeys.deliveries(id),
    queryFn: async ({ signal }) => (await callApi<{ items: DeliveryView[] }>(`/webhooks/${id}/deliveries?limit=20`, { signal })).items,
    staleTime: 5_000,
  });
}

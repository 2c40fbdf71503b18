import type { DeliveryRow, WebhookRow } from "@/db/queries/webhooks";
import { deliverySchema, webhookSchema, type DeliveryView, type WebhookView } from "@/lib/api/contract/webhooks";
import { AppError } from "@/lib/shared/app-error";
import { personView } from "@/lib/use-cases/shared/views";

export function webhookView(row: WebhookRow): WebhookView {
  return webhookSchema.parse({ ...row, createdBy: personView(row.createdBy, row.creatorName), createdAt: row.createdAt.toISOString() });
}

export function deliveryView(row: DeliveryRow): DeliveryView {
  return deliverySchema.parse({ ...row, createdAt: row.createdAt.toISOString(), deliveredAt: row.deliveredAt?.toISOString() ?? null });
}

export function webhookNotFound(): AppError {
  return new AppError("not-found", "This team has no such webhook.");
}

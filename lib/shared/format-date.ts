import { missingText } from "@/lib/shared/format";

const months = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"] as const;

/** A day in UTC: 1 Dec 2026. Server and browser write the same text whatever their time zone. */
export function formatDate(value: Date | string | null | undefined): string {
  const date = toDate(value);
  if (date === null) return missingText;
  return `${date.getUTCDate()} ${months[date.getUTCMonth()] ?? ""} ${date.getUTCFullYear()}`;
}

/** A moment in UTC: 1 Dec 2026, 08:00 UTC. */
export function formatDateTime(value: Date | string | null | undefined): string {
  const date = toDate(value);
  if (date === null) return missingText;
  const clock = [date.getUTCHours(), date.getUTCMinutes()].map((part) => String(part).padStart(2, "0")).join(":");
  return `${formatDate(date)}, ${clock} UTC`;
}

function toDate(value: Date | string | null | undefined): Date | null {
  if (value === null || value === undefined) return null;
  const date = typeof value === "string" ? new Date(value) : value;
  return Number.isNaN(date.getTime()) ? null : date;
}

import { formatExact, formatQuantity, formatRange, type QuantityUnit } from "@/lib/shared/format";
import { cn } from "./cn";

type QuantityProps = { value: number | null | undefined; unit: QuantityUnit; /** Significant digits shown. */ digits?: number; className?: string };

/** A number with its unit, short on screen and full on hover. */
export function Quantity({ value, unit, digits, className }: QuantityProps) {
  return (
    <span className={cn("figures whitespace-nowrap", className)} title={formatExact(value, unit)}>
      {formatQuantity(value, unit, digits)}
    </span>
  );
}

type QuantityRangeProps = { low: number | null; high: number | null; unit: QuantityUnit; digits?: number; className?: string };

/** "31 to 58 s", full values on hover. */
export function QuantityRange({ low, high, unit, digits, className }: QuantityRangeProps) {
  return (
    <span className={cn("figures whitespace-nowrap", className)} title={`${formatExact(low, unit)} to ${formatExact(high, unit)}`}>
      {formatRange(low, high, unit, digits)}
    </span>
  );
}

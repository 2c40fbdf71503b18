import type { ComponentProps } from "react";
import { cn } from "./cn";

/** A grey stand-in of the shape that is being loaded. */
export function Skeleton({ className, ...props }: ComponentProps<"div">) {
  return <div aria-hidden className={cn("h-4 animate-pulse rounded-sheet bg-hairline opacity-60", className)} {...props} />;
}

/** Stand-ins for lines of text, announced once. */
export function SkeletonLines({ lines = 4, label = "Loading" }: { lines?: number; label?: string }) {
  return (
    <div role="status" className="grid gap-3">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, index) => (
        <Skeleton key={index} style={{ width: `${92 - ((index * 17) % 40)}%` }} />
      ))}
    </div>
  );
}

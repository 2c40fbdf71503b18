"use client";

import type { ComponentProps } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";

export const controlClasses =
  "w-full min-w-0 rounded-sheet border border-contour bg-sheet px-3 text-base text-ink placeholder:text-faint disabled:cursor-not-allowed disabled:opacity-60 [&[readonly]]:bg-wash aria-invalid:border-bad aria-invalid:border-2";

type InputProps = ComponentProps<"input"> & { /** Stands inside the right end of the box. */ unit?: string };

/** A one-line text or number box. Numbers are set in tabular figures, right-aligned, with their unit beside them. */
export function Input({ className, unit, required, ...props }: InputProps) {
  const numeric = props.type === "number" || props.inputMode === "decimal" || props.inputMode === "numeric";
  const box = (
    <input
      {...props}
      {...useFieldControl({ ...props, required })}
      className={cn(controlClasses, "h-10 py-1.5", numeric && "figures text-right", unit !== undefined && "border-0 focus-visible:outline-0 aria-invalid:border-0", className)}
    />
  );
  if (unit === undefined) return box;
  return (
    <span className="flex w-full items-stretch rounded-sheet border border-contour bg-sheet focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-water has-aria-invalid:border-2 has-aria-invalid:border-bad">
      {box}
      <span className="flex items-center border-l border-hairline px-2.5 text-sm text-faint">{unit}</span>
    </span>
  );
}

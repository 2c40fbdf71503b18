"use client";

import { useId, type ReactNode } from "react";
import { cn } from "./cn";

type SegmentedControlProps<Value extends string> = {
  legend: string;
  /** Hides the legend from sight, not from screen readers. */
  legendHidden?: boolean;
  name?: string;
  options: readonly { value: Value; label: ReactNode; disabled?: boolean }[];
  value: Value;
  onValueChange: (value: Value) => void;
  className?: string;
};

/** A few exclusive choices side by side; native radio buttons underneath, so arrow keys work. */
export function SegmentedControl<Value extends string>({ legend, legendHidden = false, name, options, value, onValueChange, className }: SegmentedControlProps<Value>) {
  const ownName = useId();
  return (
    <fieldset className={cn("min-w-0", className)}>
      <legend className={cn("mb-1.5 text-sm font-semibold", legendHidden && "sr-only")}>{legend}</legend>
      <div className="inline-flex max-w-full flex-wrap rounded-sheet border border-contour bg-sheet">
        {options.map((option, index) => (
          <label
            key={option.value}
            className={cn(
              "flex min-h-9 items-center px-3 py-1.5 text-sm font-medium has-checked:bg-ink has-checked:text-sheet has-disabled:opacity-55 has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-water",
              index > 0 && "border-l border-hairline",
            )}
          >
            <input
              type="radio"
              className="sr-only"
              name={name ?? ownName}
              value={option.value}
              checked={option.value === value}
              disabled={option.disabled}
              onChange={() => onValueChange(option.value)}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}

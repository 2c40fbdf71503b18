"use client";

import { RadioGroup as RadioGroupPrimitive } from "radix-ui";
import { useId, type ComponentProps, type ReactNode } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";

export function RadioGroup({ className, ...props }: ComponentProps<typeof RadioGroupPrimitive.Root>) {
  const { "aria-invalid": invalid, "aria-describedby": describedBy } = useFieldControl(props);
  return <RadioGroupPrimitive.Root {...props} aria-invalid={invalid} aria-describedby={describedBy} className={cn("grid gap-2", className)} />;
}

type RadioLineProps = ComponentProps<typeof RadioGroupPrimitive.Item> & { label: ReactNode; help?: ReactNode };

/** One choice of a group with its label and help. */
export function RadioLine({ label, help, className, ...props }: RadioLineProps) {
  const ownId = useId();
  const id = props.id ?? ownId;
  const helpId = help === undefined ? undefined : `${id}-help`;
  return (
    <div className={cn("flex items-start gap-2.5", className)}>
      <RadioGroupPrimitive.Item
        {...props}
        id={id}
        aria-describedby={helpId}
        className="mt-0.5 grid size-5 shrink-0 place-items-center rounded-full border border-contour bg-sheet disabled:cursor-not-allowed disabled:opacity-60 data-[state=checked]:border-ink"
      >
        <RadioGroupPrimitive.Indicator className="size-2.5 rounded-full bg-ink" />
      </RadioGroupPrimitive.Item>
      <div className="grid gap-0.5">
        <label htmlFor={id} className="text-sm leading-6 font-medium">
          {label}
        </label>
        {help !== undefined && (
          <p id={helpId} className="text-sm text-faint">
            {help}
          </p>
        )}
      </div>
    </div>
  );
}

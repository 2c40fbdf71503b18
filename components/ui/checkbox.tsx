"use client";

import { Check, Minus } from "lucide-react";
import { Checkbox as CheckboxPrimitive } from "radix-ui";
import { useId, type ComponentProps, type ReactNode } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";

export function Checkbox({ className, required, ...props }: ComponentProps<typeof CheckboxPrimitive.Root>) {
  const { "aria-required": _announced, ...linked } = useFieldControl({ ...props, required });
  return (
    <CheckboxPrimitive.Root
      {...props}
      {...linked}
      required={required}
      className={cn(
        "grid size-5 shrink-0 place-items-center rounded-sheet border border-contour bg-sheet text-sheet disabled:cursor-not-allowed disabled:opacity-60 aria-invalid:border-bad data-[state=checked]:border-ink data-[state=checked]:bg-ink data-[state=indeterminate]:border-ink data-[state=indeterminate]:bg-ink",
        className,
      )}
    >
      <CheckboxPrimitive.Indicator className="group">
        <Check aria-hidden strokeWidth={3} className="size-4 group-data-[state=indeterminate]:hidden" />
        <Minus aria-hidden strokeWidth={3} className="hidden size-4 group-data-[state=indeterminate]:block" />
      </CheckboxPrimitive.Indicator>
    </CheckboxPrimitive.Root>
  );
}

type CheckboxLineProps = ComponentProps<typeof CheckboxPrimitive.Root> & { label: ReactNode; help?: ReactNode };

/** A checkbox with its label and help on one line. */
export function CheckboxLine({ label, help, className, ...props }: CheckboxLineProps) {
  const ownId = useId();
  const id = props.id ?? ownId;
  const helpId = help === undefined ? undefined : `${id}-help`;
  return (
    <div className={cn("flex items-start gap-2.5", className)}>
      <Checkbox {...props} id={id} aria-describedby={helpId} className="mt-0.5" />
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

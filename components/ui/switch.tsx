"use client";

import { Switch as SwitchPrimitive } from "radix-ui";
import type { ComponentProps } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";

/** On or off at once. The knob's place and its filled track both tell the state. */
export function Switch({ className, ...props }: ComponentProps<typeof SwitchPrimitive.Root>) {
  const { id, "aria-describedby": describedBy, "aria-invalid": invalid } = useFieldControl(props);
  return (
    <SwitchPrimitive.Root
      {...props}
      id={id}
      aria-describedby={describedBy}
      aria-invalid={invalid}
      className={cn(
        "inline-flex h-6 w-11 shrink-0 items-center rounded-full border border-contour bg-sheet p-0.5 transition-colors disabled:cursor-not-allowed disabled:opacity-60 data-[state=checked]:border-ink data-[state=checked]:bg-ink",
        className,
      )}
    >
      <SwitchPrimitive.Thumb className="block size-4.5 rounded-full bg-contour transition-transform data-[state=checked]:translate-x-5 data-[state=checked]:bg-sheet" />
    </SwitchPrimitive.Root>
  );
}

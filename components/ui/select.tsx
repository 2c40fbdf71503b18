"use client";

import { ChevronDown } from "lucide-react";
import type { ComponentProps } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";
import { controlClasses } from "./input";

/** The browser's own select, so that keyboards, phones and screen readers find what they know. */
export function Select({ className, required, children, ...props }: ComponentProps<"select">) {
  return (
    <span className="relative block w-full min-w-0">
      <select {...props} {...useFieldControl({ ...props, required })} className={cn(controlClasses, "h-10 appearance-none py-1.5 pr-9", className)}>
        {children}
      </select>
      <ChevronDown aria-hidden className="pointer-events-none absolute top-1/2 right-3 size-4 -translate-y-1/2 text-faint" />
    </span>
  );
}

"use client";

import type { ComponentProps } from "react";
import { cn } from "./cn";
import { useFieldControl } from "./field";
import { controlClasses } from "./input";

export function Textarea({ className, required, ...props }: ComponentProps<"textarea">) {
  return <textarea rows={4} {...props} {...useFieldControl({ ...props, required })} className={cn(controlClasses, "min-h-20 py-2", className)} />;
}

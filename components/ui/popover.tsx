"use client";

import { Popover as PopoverPrimitive } from "radix-ui";
import type { ComponentProps } from "react";
import { cn } from "./cn";

export const Popover = PopoverPrimitive.Root;
export const PopoverTrigger = PopoverPrimitive.Trigger;
export const PopoverClose = PopoverPrimitive.Close;

export function PopoverContent({ className, sideOffset = 6, ...props }: ComponentProps<typeof PopoverPrimitive.Content>) {
  return (
    <PopoverPrimitive.Portal>
      <PopoverPrimitive.Content
        sideOffset={sideOffset}
        collisionPadding={8}
        className={cn("z-50 w-72 max-w-[calc(100vw-1rem)] rounded-sheet border border-contour bg-sheet p-4 text-sm text-ink shadow-[0_8px_24px_-10px_rgb(0_0_0/0.35)]", className)}
        {...props}
      />
    </PopoverPrimitive.Portal>
  );
}

import { cva, type VariantProps } from "class-variance-authority";
import { Slot } from "radix-ui";
import type { ComponentProps } from "react";
import { cn } from "./cn";

/** Classes of a button, for links that look like one. */
export const buttonVariants = cva(
  "inline-flex shrink-0 items-center justify-center gap-2 whitespace-nowrap rounded-sheet border text-sm font-semibold leading-none transition-colors disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-not-allowed aria-disabled:opacity-55 [&_svg]:size-4 [&_svg]:shrink-0",
  {
    variants: {
      variant: {
        main: "border-peg bg-peg text-sheet enabled:hover:border-ink enabled:hover:bg-ink [a&]:hover:border-ink [a&]:hover:bg-ink",
        plain: "border-contour bg-sheet text-ink enabled:hover:bg-wash enabled:hover:border-ink [a&]:hover:border-ink [a&]:hover:bg-wash",
        quiet: "border-transparent bg-transparent text-ink enabled:hover:bg-wash [a&]:hover:bg-wash",
        bad: "border-bad bg-sheet text-bad enabled:hover:bg-bad enabled:hover:text-sheet [a&]:hover:bg-bad [a&]:hover:text-sheet",
        link: "border-transparent bg-transparent px-0 text-water underline underline-offset-3 enabled:hover:text-ink",
      },
      size: {
        default: "min-h-10 px-4 py-2",
        small: "min-h-8 px-2.5 py-1.5",
        large: "min-h-12 px-6 py-3 text-base",
        icon: "size-10 p-0",
      },
    },
    defaultVariants: { variant: "plain", size: "default" },
  },
);

export type ButtonProps = ComponentProps<"button"> & VariantProps<typeof buttonVariants> & { asChild?: boolean };

/** A button; `main` is for the one main action of a page. */
export function Button({ className, variant, size, asChild = false, type, ...props }: ButtonProps) {
  const classes = cn(buttonVariants({ variant, size }), className);
  if (asChild) return <Slot.Root className={classes} {...props} />;
  return <button type={type ?? "button"} className={classes} {...props} />;
}

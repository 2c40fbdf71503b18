import { cva, type VariantProps } from "class-variance-authority";
import type { ComponentProps } from "react";
import { cn } from "./cn";

const badgeVariants = cva("inline-flex items-center gap-1.5 rounded-sheet border px-1.5 py-0.5 text-xs leading-4 font-semibold whitespace-nowrap [&_svg]:size-3", {
  variants: {
    tone: {
      plain: "border-hairline bg-wash text-ink",
      water: "border-water text-water",
      forest: "border-forest text-forest",
      peg: "border-peg text-peg",
      warn: "border-warn text-warn",
      bad: "border-bad text-bad",
      faint: "border-dashed border-faint text-faint",
    },
  },
  defaultVariants: { tone: "plain" },
});

/** A word about a thing's state. The word tells it; the colour only helps. */
export function Badge({ className, tone, ...props }: ComponentProps<"span"> & VariantProps<typeof badgeVariants>) {
  return <span className={cn(badgeVariants({ tone }), className)} {...props} />;
}

import type { ComponentProps } from "react";
import { cn } from "./cn";

/** A table that scrolls sideways inside its own box when the page is narrow; the box can be reached and moved by keyboard. */
export function Table({ className, label, ...props }: ComponentProps<"table"> & { /** Names the scrolling region. */ label: string }) {
  return (
    <div role="region" aria-label={label} tabIndex={0} className="relative w-full overflow-x-auto print:overflow-visible">
      <table className={cn("w-full border-collapse text-left text-sm", className)} {...props} />
    </div>
  );
}

export function TableHeader({ className, ...props }: ComponentProps<"thead">) {
  return <thead className={cn("border-b border-contour", className)} {...props} />;
}

export function TableBody({ className, ...props }: ComponentProps<"tbody">) {
  return <tbody className={cn("[&>tr]:border-b [&>tr]:border-hairline", className)} {...props} />;
}

export function TableRow({ className, ...props }: ComponentProps<"tr">) {
  return <tr className={cn("[tbody_&]:hover:bg-wash", className)} {...props} />;
}

export function TableHead({ className, numeric = false, scope = "col", ...props }: ComponentProps<"th"> & { numeric?: boolean }) {
  return <th scope={scope} className={cn("px-3 py-2 align-bottom font-semibold whitespace-nowrap first:pl-0 last:pr-0", numeric && "text-right", className)} {...props} />;
}

/** A cell; numbers are right-aligned in tabular figures. */
export function TableCell({ className, numeric = false, ...props }: ComponentProps<"td"> & { numeric?: boolean }) {
  return <td className={cn("px-3 py-2 align-top first:pl-0 last:pr-0", numeric && "figures text-right whitespace-nowrap", className)} {...props} />;
}

export function TableCaption({ className, ...props }: ComponentProps<"caption">) {
  return <caption className={cn("caption-bottom pt-2 text-left text-sm text-faint", className)} {...props} />;
}

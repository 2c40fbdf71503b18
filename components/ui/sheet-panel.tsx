import type { ComponentProps, ReactNode } from "react";
import { cn } from "./cn";

/** A framed part of a sheet with an optional heading and actions. */
export function SheetPanel({ title, actions, className, children, level = 2, ...props }: Omit<ComponentProps<"section">, "title"> & { title?: ReactNode; actions?: ReactNode; level?: 2 | 3 }) {
  const Heading = level === 2 ? "h2" : "h3";
  return (
    <section className={cn("border border-hairline bg-sheet p-4 sm:p-5", className)} {...props}>
      {(title !== undefined || actions !== undefined) && (
        <div className="mb-3 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-2">
          {title !== undefined && <Heading className={cn("font-semibold", level === 2 ? "text-xl" : "text-base")}>{title}</Heading>}
          {actions !== undefined && <div className="flex flex-wrap gap-2">{actions}</div>}
        </div>
      )}
      {children}
    </section>
  );
}

import type { ReactNode } from "react";
import { cn } from "@/components/ui/cn";

type SheetProps = { children: ReactNode; /** Legend, derived sizes, sources, definitions; folds under the work on a narrow page. */ margin?: ReactNode; className?: string };

/** The page below the band: the work inside a map's neat line, the margin to its right. */
export function Sheet({ children, margin, className }: SheetProps) {
  return (
    <div className="mx-auto w-full max-w-desk px-3 py-5 sm:px-6 sm:py-7">
      <div className={cn("grid items-start gap-x-7 gap-y-6", margin !== undefined && "lg:grid-cols-[minmax(0,1fr)_17rem] xl:grid-cols-[minmax(0,1fr)_19rem]")}>
        <div className={cn("neatline grid min-w-0 grid-cols-1 content-start gap-6 px-4 py-6 sm:px-7 sm:py-8", className)}>{children}</div>
        {margin}
      </div>
    </div>
  );
}

type MarginProps = { children: ReactNode; label?: string; /** Stays in view beside a long form whose answers it follows. */ following?: boolean };

/** The sheet's right-hand margin. Fill it with MarginSections. */
export function Margin({ children, label = "Margin notes", following = false }: MarginProps) {
  return (
    <aside
      aria-label={label}
      tabIndex={following ? 0 : undefined}
      className={cn(
        "grid min-w-0 content-start gap-6 px-1 sm:grid-cols-2 lg:grid-cols-1 lg:pr-2 lg:pb-2",
        following && "lg:sticky lg:top-5 lg:max-h-[calc(100dvh-2.5rem)] lg:overflow-y-auto",
      )}
    >
      {children}
    </aside>
  );
}

/** One note of the margin under a thin rule. */
export function MarginSection({ title, children, className }: { title: string; children: ReactNode; className?: string }) {
  return (
    <section data-keep-together className={cn("border-t border-contour pt-2 text-sm", className)}>
      <h2 className="mb-1.5 text-sm font-semibold">{title}</h2>
      {children}
    </section>
  );
}

/** Names and values of the margin, values right-aligned. */
export function MarginFacts({ facts }: { facts: readonly { name: ReactNode; value: ReactNode }[] }) {
  return (
    <dl className="grid gap-y-1">
      {facts.map((fact, index) => (
        <div key={index} className="flex items-baseline justify-between gap-3">
          <dt className="text-faint">{fact.name}</dt>
          <dd className="figures text-right font-medium">{fact.value}</dd>
        </div>
      ))}
    </dl>
  );
}

/** What the signs of a drawing mean. */
export function Legend({ items }: { items: readonly { sign: ReactNode; text: ReactNode }[] }) {
  return (
    <ul className="grid gap-1.5">
      {items.map((item, index) => (
        <li key={index} className="grid grid-cols-[1.75rem_1fr] items-center gap-2">
          <span aria-hidden className="grid place-items-center">
            {item.sign}
          </span>
          <span>{item.text}</span>
        </li>
      ))}
    </ul>
  );
}

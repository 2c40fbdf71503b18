import { CircleAlert, CircleCheck, Info, TriangleAlert, type LucideIcon } from "lucide-react";
import type { ReactNode } from "react";
import { cn } from "./cn";

export const noticeTones = ["info", "good", "warn", "bad"] as const;
export type NoticeTone = (typeof noticeTones)[number];

const looks: Record<NoticeTone, { icon: LucideIcon; iconClasses: string; boxClasses: string; word: string }> = {
  info: { icon: Info, iconClasses: "text-water", boxClasses: "border-l-water", word: "Note" },
  good: { icon: CircleCheck, iconClasses: "text-forest", boxClasses: "border-l-forest", word: "Done" },
  warn: { icon: TriangleAlert, iconClasses: "text-warn", boxClasses: "border-l-warn", word: "Caution" },
  bad: { icon: CircleAlert, iconClasses: "text-bad", boxClasses: "border-l-bad", word: "Error" },
};

type NoticeProps = {
  tone?: NoticeTone;
  title?: ReactNode;
  /** Reads the notice out when it appears: for answers to what the person just did. */
  announce?: boolean;
  action?: ReactNode;
  className?: string;
  children?: ReactNode;
};

/** A boxed sentence that must not be missed: what was wrong, where, what to do. */
export function Notice({ tone = "info", title, announce = false, action, className, children }: NoticeProps) {
  const { icon: Icon, iconClasses, boxClasses, word } = looks[tone];
  return (
    <div role={announce ? (tone === "bad" ? "alert" : "status") : "note"} data-keep-together className={cn("flex gap-3 border border-l-4 border-hairline bg-sheet px-4 py-3 text-sm", boxClasses, className)}>
      <Icon aria-hidden className={cn("mt-0.5 size-4 shrink-0", iconClasses)} />
      <div className="grid min-w-0 gap-1">
        <span className="sr-only">{word}: </span>
        {title !== undefined && <p className="font-semibold">{title}</p>}
        {children !== undefined && <div className="grid gap-2">{children}</div>}
        {action !== undefined && <div className="pt-1">{action}</div>}
      </div>
    </div>
  );
}

"use client";

import { useTheme } from "next-themes";
import { useEffect, useRef } from "react";
import { toast, Toaster as Sonner } from "sonner";
import type { NoticeKind, ShortNotice } from "./notify";

const show: Record<NoticeKind, (text: string) => void> = { plain: (text) => toast(text), success: (text) => toast.success(text), error: (text) => toast.error(text) };

/** Notices stacked in a corner, each for eight seconds. */
export function ToastStack({ notices }: { notices: readonly ShortNotice[] }) {
  const { resolvedTheme } = useTheme();
  const shown = useRef(0);
  useEffect(() => {
    for (const notice of notices) {
      if (notice.id <= shown.current) continue;
      shown.current = notice.id;
      show[notice.kind](notice.text);
    }
  }, [notices]);
  return (
    <Sonner
      theme={resolvedTheme === "dark" ? "dark" : "light"}
      position="bottom-right"
      duration={8000}
      closeButton
      toastOptions={{
        unstyled: true,
        classNames: {
          toast: "relative flex w-full items-start gap-3 rounded-sheet border border-l-4 border-contour bg-sheet px-4 py-3 pr-9 font-sans text-sm text-ink shadow-[0_8px_24px_-10px_rgb(0_0_0/0.35)]",
          title: "font-semibold",
          description: "text-faint",
          icon: "mt-0.5 shrink-0 [&_svg]:size-4",
          actionButton: "ml-auto shrink-0 rounded-sheet border border-contour px-2 py-1 font-semibold",
          closeButton: "absolute top-2 right-2 grid size-6 place-items-center rounded-sheet text-faint hover:text-ink [&_svg]:size-3.5",
          success: "border-l-forest [&_[data-icon]]:text-forest",
          error: "border-l-bad [&_[data-icon]]:text-bad",
          warning: "border-l-warn [&_[data-icon]]:text-warn",
          info: "border-l-water [&_[data-icon]]:text-water",
        },
      }}
    />
  );
}

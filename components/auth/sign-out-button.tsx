"use client";

import { useTransition } from "react";
import { Button, type ButtonProps } from "@/components/ui/button";
import { goTo } from "./go-to";

type Props = ButtonProps & { action: () => Promise<void>; then?: string };

export function SignOutButton({ action, then = "/sign-in", children, ...props }: Props) {
  const [busy, start] = useTransition();
  return (
    <Button
      disabled={busy}
      onClick={() =>
        start(async () => {
          await action();
          goTo(then);
        })
      }
      {...props}
    >
      {children ?? "Sign out"}
    </Button>
  );
}

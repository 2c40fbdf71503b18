"use client";

import { useTransition } from "react";
import { notify } from "@/components/ui/notify";
import { Button } from "@/components/ui/button";
import type { FormResult } from "@/lib/auth/form-answer";

export function OtherSessions({ action }: { action: () => Promise<FormResult<undefined>> }) {
  const [busy, start] = useTransition();
  function end(): void {
    start(async () => {
      const result = await action();
      if (result.ok) notify("All other sessions are signed out.", "success");
      else notify(result.message, "error");
    });
  }
  return (
    <Button disabled={busy} onClick={end}>
      Sign out of other sessions
    </Button>
  );
}

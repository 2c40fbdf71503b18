"use client";

import { useTransition } from "react";
import { toast } from "sonner";
import { Button } from "@/components/ui/button";
import type { FormResult } from "@/lib/auth/form-answer";

export function OtherSessions({ action }: { action: () => Promise<FormResult<undefined>> }) {
  const [busy, start] = useTransition();
  function end(): void {
    start(async () => {
      const result = await action();
      if (result.ok) toast.success("All other sessions are signed out.");
      else toast.error(result.message);
    });
  }
  return (
    <Button disabled={busy} onClick={end}>
      Sign out of other sessions
    </Button>
  );
}

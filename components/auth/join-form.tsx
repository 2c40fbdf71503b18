"use client";

import { useState, useTransition } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { FormResult } from "@/lib/auth/form-answer";
import { goTo } from "./go-to";

/** The one button of an invitation, for somebody who is signed in with its address. */
export function JoinForm({ invitationId, teamName, action }: { invitationId: string; teamName: string; action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, start] = useTransition();
  function join(): void {
    start(async () => {
      const data = new FormData();
      data.set("invitationId", invitationId);
      const result = await action(data);
      if (result.ok) goTo("/cases");
      else setProblem(result.message);
    });
  }
  return (
    <div className="grid gap-4">
      {problem !== null && (
        <Notice tone="bad" announce>
          {problem}
        </Notice>
      )}
      <Button variant="main" disabled={busy} onClick={join} className="justify-self-start">
        Join {teamName}
      </Button>
    </div>
  );
}

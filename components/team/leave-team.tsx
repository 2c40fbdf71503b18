"use client";

import { goTo } from "@/components/auth/go-to";
import type { FormResult } from "@/lib/auth/form-answer";
import { ConfirmButton } from "./confirm-button";

/** The way out of a team. */
export function LeaveTeam({ teamName, leave }: { teamName: string; leave: () => Promise<FormResult<void>> }) {
  return (
    <div className="justify-self-start">
      <ConfirmButton
        label="Leave the team"
        accessibleLabel="Leave the team"
        title={`Leave ${teamName}?`}
        text="Your keys for this team end at once. What you recorded stays. Only an owner can bring you back."
        act={leave}
        done={`You left ${teamName}.`}
        onDone={() => goTo("/cases")}
      />
    </div>
  );
}

"use client";

import { ChevronsUpDown } from "lucide-react";
import { lazy, useTransition } from "react";
import { notify } from "@/components/ui/notify";
import { goTo } from "@/components/auth/go-to";
import { Button } from "@/components/ui/button";
import { LazyMenu } from "@/components/ui/lazy-menu";
import type { FormResult } from "@/lib/auth/form-answer";

const TeamSwitcherContent = lazy(() => import("./team-switcher-content"));

type Props = { teams: readonly { id: string; name: string }[]; activeId: string; action: (teamId: string) => Promise<FormResult<undefined>> };

/** Shows the team one acts for, and changes it. */
export function TeamSwitcher({ teams, activeId, action }: Props) {
  const [busy, start] = useTransition();
  const active = teams.find(({ id }) => id === activeId);

  function change(teamId: string): void {
    if (teamId === activeId) return;
    start(async () => {
      const result = await action(teamId);
      if (result.ok) goTo("/cases");
      else notify(result.message, "error");
    });
  }

  const button = (
    <Button variant="quiet" size="small" disabled={busy} className="max-w-full sm:max-w-56">
      <span className="sr-only">Team: </span>
      <span className="truncate leading-normal">{active?.name ?? "Team"}</span>
      <ChevronsUpDown aria-hidden className="text-faint" />
    </Button>
  );
  return <LazyMenu button={button}>{(trigger) => <TeamSwitcherContent trigger={trigger} teams={teams} activeId={activeId} change={change} />}</LazyMenu>;
}

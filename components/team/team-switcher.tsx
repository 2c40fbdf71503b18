"use client";

import { ChevronsUpDown } from "lucide-react";
import Link from "next/link";
import { useTransition } from "react";
import { toast } from "sonner";
import { goTo } from "@/components/auth/go-to";
import { Button } from "@/components/ui/button";
import {
  DropdownMenu,
  DropdownMenuContent,
  DropdownMenuItem,
  DropdownMenuLabel,
  DropdownMenuRadioGroup,
  DropdownMenuRadioItem,
  DropdownMenuSeparator,
  DropdownMenuTrigger,
} from "@/components/ui/dropdown-menu";
import type { FormResult } from "@/lib/auth/form-answer";

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
      else toast.error(result.message);
    });
  }

  return (
    <DropdownMenu>
      <DropdownMenuTrigger asChild>
        <Button variant="quiet" size="small" disabled={busy} className="max-w-full sm:max-w-56">
          <span className="sr-only">Team: </span>
          <span className="truncate leading-normal">{active?.name ?? "Team"}</span>
          <ChevronsUpDown aria-hidden className="text-faint" />
        </Button>
      </DropdownMenuTrigger>
      <DropdownMenuContent align="start" className="max-w-72">
        <DropdownMenuLabel>Act for</DropdownMenuLabel>
        <DropdownMenuRadioGroup value={activeId} onValueChange={change}>
          {teams.map((team) => (
            <DropdownMenuRadioItem key={team.id} value={team.id}>
              <span className="truncate">{team.name}</span>
            </DropdownMenuRadioItem>
          ))}
        </DropdownMenuRadioGroup>
        <DropdownMenuSeparator />
        <DropdownMenuItem asChild>
          <Link href="/team">Members and keys</Link>
        </DropdownMenuItem>
        <DropdownMenuItem asChild>
          <Link href="/machines">Machines</Link>
        </DropdownMenuItem>
        <DropdownMenuItem asChild>
          <Link href="/register/team">Make a team</Link>
        </DropdownMenuItem>
      </DropdownMenuContent>
    </DropdownMenu>
  );
}

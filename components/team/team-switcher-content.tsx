"use client";

import Link from "next/link";
import type { ReactElement } from "react";
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

type Props = { trigger: ReactElement; teams: readonly { id: string; name: string }[]; activeId: string; change: (teamId: string) => void };

/** The teams to act for, and the ways to what belongs to the team. */
export default function TeamSwitcherContent({ trigger, teams, activeId, change }: Props) {
  return (
    <DropdownMenu defaultOpen>
      <DropdownMenuTrigger asChild>{trigger}</DropdownMenuTrigger>
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

"use client";

import Link from "next/link";
import type { ReactElement } from "react";
import { DropdownMenu, DropdownMenuContent, DropdownMenuItem, DropdownMenuLabel, DropdownMenuSeparator, DropdownMenuTrigger } from "@/components/ui/dropdown-menu";

type Props = { trigger: ReactElement; name: string; email: string; role: string; leave: () => void };

/** Who is signed in, with the ways to the account, the team, the machines and out. */
export default function PersonMenuContent({ trigger, name, email, role, leave }: Props) {
  return (
    <DropdownMenu defaultOpen>
      <DropdownMenuTrigger asChild>{trigger}</DropdownMenuTrigger>
      <DropdownMenuContent align="end" className="max-w-72">
        <DropdownMenuLabel className="grid">
          <span className="truncate text-sm text-ink">{name}</span>
          <span className="truncate font-normal">{email}</span>
          <span className="font-normal">{role} of this team</span>
        </DropdownMenuLabel>
        <DropdownMenuSeparator />
        <DropdownMenuItem asChild>
          <Link href="/account">Account</Link>
        </DropdownMenuItem>
        <DropdownMenuItem asChild>
          <Link href="/team">Team</Link>
        </DropdownMenuItem>
        <DropdownMenuItem asChild>
          <Link href="/machines">Machines</Link>
        </DropdownMenuItem>
        <DropdownMenuSeparator />
        <DropdownMenuItem onSelect={leave}>Sign out</DropdownMenuItem>
      </DropdownMenuContent>
    </DropdownMenu>
  );
}

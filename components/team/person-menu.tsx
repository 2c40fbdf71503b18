"use client";

import { CircleUserRound } from "lucide-react";
import Link from "next/link";
import { useTransition } from "react";
import { goTo } from "@/components/auth/go-to";
import { Button } from "@/components/ui/button";
import { DropdownMenu, DropdownMenuContent, DropdownMenuItem, DropdownMenuLabel, DropdownMenuSeparator, DropdownMenuTrigger } from "@/components/ui/dropdown-menu";

type Props = { name: string; email: string; role: string; signOut: () => Promise<void> };

/** Who is signed in, with the way to the account and out. */
export function PersonMenu({ name, email, role, signOut }: Props) {
  const [busy, start] = useTransition();

  function leave(): void {
    start(async () => {
      await signOut();
      goTo("/sign-in");
    });
  }

  return (
    <DropdownMenu>
      <DropdownMenuTrigger asChild>
        <Button variant="quiet" size="icon" disabled={busy} aria-label={`${name}: account`}>
          <CircleUserRound aria-hidden />
        </Button>
      </DropdownMenuTrigger>
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

"use client";

import { CircleUserRound } from "lucide-react";
import { lazy, useTransition } from "react";
import { goTo } from "@/components/auth/go-to";
import { Button } from "@/components/ui/button";
import { LazyMenu } from "@/components/ui/lazy-menu";

const PersonMenuContent = lazy(() => import("./person-menu-content"));

type Props = { name: string; email: string; role: string; signOut: () => Promise<void> };

/** The button behind which the person's menu waits. */
export function PersonMenu({ name, email, role, signOut }: Props) {
  const [busy, start] = useTransition();

  function leave(): void {
    start(async () => {
      await signOut();
      goTo("/sign-in");
    });
  }

  const button = (
    <Button variant="quiet" size="icon" disabled={busy} aria-label={`${name}: account`}>
      <CircleUserRound aria-hidden />
    </Button>
  );
  return <LazyMenu button={button}>{(trigger) => <PersonMenuContent trigger={trigger} name={name} email={email} role={role} leave={leave} />}</LazyMenu>;
}

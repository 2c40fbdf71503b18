import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { AccountCard } from "@/components/auth/account-card";
import { SignOutButton } from "@/components/auth/sign-out-button";
import { TeamForm } from "@/components/auth/team-form";
import { currentPerson } from "@/lib/auth/actor";
import { createTeamAction, signOutAction } from "../../actions";

export const metadata: Metadata = { title: "Make a team" };

export default async function NewTeamPage() {
  const person = await currentPerson();
  if (!person) redirect("/sign-in?next=/register/team");
  const below = person.teams.length === 0 ? "You are in no team at present. Make one, or ask an owner to invite you." : "A second team keeps its cases, runs and rules apart from those of your other teams.";
  return (
    <AccountCard
      title="Make a team"
      below={below}
      foot={
        <span className="flex flex-wrap items-center justify-between gap-2">
          Signed in as {person.userEmail}
          <SignOutButton action={signOutAction} variant="quiet" size="small" />
        </span>
      }
    >
      <TeamForm action={createTeamAction} />
    </AccountCard>
  );
}

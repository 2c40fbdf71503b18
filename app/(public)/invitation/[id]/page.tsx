import type { Metadata } from "next";
import Link from "next/link";
import { AccountCard } from "@/components/auth/account-card";
import { JoinForm } from "@/components/auth/join-form";
import { InvitedRegisterForm } from "@/components/auth/register-form";
import { SignOutButton } from "@/components/auth/sign-out-button";
import { buttonVariants } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { currentPerson } from "@/lib/auth/actor";
import { formResult } from "@/lib/auth/form-result";
import { readInvitation, type OpenInvitation } from "@/lib/use-cases/team/read-invitation";
import { joinAction, registerAction, signOutAction } from "../../actions";

export const metadata: Metadata = { title: "Invitation", robots: { index: false } };

export default async function InvitationPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const found = await formResult(() => readInvitation({ headers: new Headers() }, { invitationId: id }));
  if (!found.ok) {
    return (
      <AccountCard title="Invitation">
        <Notice tone="warn">{found.message}</Notice>
      </AccountCard>
    );
  }
  const invitation = found.value;
  const person = await currentPerson();
  return (
    <AccountCard title={`Join ${invitation.teamName}`} below={`${invitation.inviterName} invites ${invitation.email} as ${invitation.role}.`}>
      {person ? <ForSignedIn invitation={invitation} email={person.userEmail} /> : <ForStranger invitation={invitation} />}
    </AccountCard>
  );
}

function ForSignedIn({ invitation, email }: { invitation: OpenInvitation; email: string }) {
  if (email.toLowerCase() === invitation.email) return <JoinForm invitationId={invitation.id} teamName={invitation.teamName} action={joinAction} />;
  return (
    <div className="grid gap-4">
      <Notice tone="warn">
        You are signed in as {email}, but the invitation is for {invitation.email}. Sign out first, then open the link again.
      </Notice>
      <SignOutButton action={signOutAction} then={`/invitation/${invitation.id}`} className="justify-self-start" />
    </div>
  );
}

function ForStranger({ invitation }: { invitation: OpenInvitation }) {
  if (!invitation.accountExists) return <InvitedRegisterForm email={invitation.email} invitationId={invitation.id} action={registerAction} />;
  const query = new URLSearchParams({ next: `/invitation/${invitation.id}`, email: invitation.email });
  return (
    <div className="grid gap-4">
      <p className="text-sm">This address has an account. Sign in to join.</p>
      <Link href={`/sign-in?${query}`} className={buttonVariants({ variant: "main", className: "justify-self-start" })}>
        Sign in
      </Link>
    </div>
  );
}

import type { Metadata } from "next";
import { SignOutButton } from "@/components/auth/sign-out-button";
import { NameForm } from "@/components/auth/name-form";
import { OtherSessions } from "@/components/auth/other-sessions";
import { PasswordForm } from "@/components/auth/password-form";
import { ThemeChoice } from "@/components/auth/theme-choice";
import { PageTitle } from "@/components/layout/page-title";
import { Sheet } from "@/components/layout/sheet";
import { requireActor } from "@/lib/auth/actor";
import { signOutAction } from "../../(public)/actions";
import { changeNameAction, changePasswordAction, endOtherSessionsAction } from "./actions";

export const metadata: Metadata = { title: "Account" };

export default async function AccountPage() {
  const actor = await requireActor();
  return (
    <Sheet>
      <PageTitle title="Account" below={`Signed in as ${actor.userEmail}.`} />
      <section className="grid max-w-xl gap-3">
        <h2 className="text-xl font-semibold">Name</h2>
        <NameForm name={actor.userName} action={changeNameAction} />
      </section>
      <section className="grid max-w-xl gap-3">
        <h2 className="text-xl font-semibold">Password</h2>
        <PasswordForm email={actor.userEmail} action={changePasswordAction} />
      </section>
      <section className="grid max-w-xl gap-3">
        <h2 className="text-xl font-semibold">Theme</h2>
        <ThemeChoice />
      </section>
      <section className="grid max-w-xl gap-3">
        <h2 className="text-xl font-semibold">Sessions</h2>
        <div className="flex flex-wrap gap-2">
          <OtherSessions action={endOtherSessionsAction} />
          <SignOutButton action={signOutAction} />
        </div>
      </section>
    </Sheet>
  );
}

import type { Metadata } from "next";
import Link from "next/link";
import { redirect } from "next/navigation";
import { AccountCard } from "@/components/auth/account-card";
import { RegisterForm } from "@/components/auth/register-form";
import { currentPerson } from "@/lib/auth/actor";
import { isFirstRegistration } from "@/lib/use-cases/team/register-person";
import { registerAction } from "../actions";

export const metadata: Metadata = { title: "Register" };

export default async function RegisterPage() {
  if (await currentPerson()) redirect("/cases");
  const first = await isFirstRegistration();
  return (
    <AccountCard
      title="Register"
      below={first ? "Nobody has registered here yet. You will own the first team." : "You were invited? Then open the link in your letter instead: it leads into the team."}
      foot={
        <span>
          Registered already?{" "}
          <Link href="/sign-in" className="text-water underline underline-offset-3">
            Sign in
          </Link>
        </span>
      }
    >
      <RegisterForm action={registerAction} />
    </AccountCard>
  );
}

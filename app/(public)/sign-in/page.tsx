import type { Metadata } from "next";
import Link from "next/link";
import { redirect } from "next/navigation";
import { AccountCard } from "@/components/auth/account-card";
import { SignInForm } from "@/components/auth/sign-in-form";
import { Notice } from "@/components/ui/notice";
import { currentPerson } from "@/lib/auth/actor";
import { readQuery, type PageQuery } from "@/lib/auth/page-query";
import { safeNext } from "@/lib/auth/safe-next";
import { signInAction } from "../actions";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({ searchParams }: { searchParams: Promise<PageQuery> }) {
  const query = readQuery(await searchParams, ["next", "reset", "email"]);
  const next = safeNext(query.next);
  if (await currentPerson()) redirect(next);
  return (
    <AccountCard
      title="Sign in"
      foot={
        <>
          <Link href="/forgot-password" className="text-water underline underline-offset-3">
            Forgotten the password
          </Link>
          <span>
            No account yet?{" "}
            <Link href="/register" className="text-water underline underline-offset-3">
              Register
            </Link>
          </span>
        </>
      }
    >
      {query.reset === "done" && (
        <Notice tone="good" announce>
          The new password is set. Sign in with it.
        </Notice>
      )}
      <SignInForm next={next} email={query.email ?? ""} action={signInAction} />
    </AccountCard>
  );
}

import type { Metadata } from "next";
import Link from "next/link";
import { AccountCard } from "@/components/auth/account-card";
import { ResetPasswordForm } from "@/components/auth/reset-password-form";
import { Notice } from "@/components/ui/notice";
import { readQuery, type PageQuery } from "@/lib/auth/page-query";
import { resetPasswordAction } from "../actions";

export const metadata: Metadata = { title: "Choose a new password" };

export default async function ResetPasswordPage({ searchParams }: { searchParams: Promise<PageQuery> }) {
  const { token } = readQuery(await searchParams, ["token"]);
  return (
    <AccountCard
      title="Choose a new password"
      foot={
        <Link href="/forgot-password" className="text-water underline underline-offset-3">
          Ask for a new link
        </Link>
      }
    >
      {token === undefined ? <Notice tone="bad">The link is incomplete. Open it from the letter again, or ask for a new one.</Notice> : <ResetPasswordForm token={token} action={resetPasswordAction} />}
    </AccountCard>
  );
}

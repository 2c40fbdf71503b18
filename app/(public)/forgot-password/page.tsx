import type { Metadata } from "next";
import Link from "next/link";
import { AccountCard } from "@/components/auth/account-card";
import { ForgotPasswordForm } from "@/components/auth/forgot-password-form";
import { askForResetAction } from "../actions";

export const metadata: Metadata = { title: "Forgotten password" };

export default function ForgotPasswordPage() {
  return (
    <AccountCard
      title="Forgotten password"
      below="Enter the address of your account. A letter brings a link to choose a new password."
      foot={
        <Link href="/sign-in" className="text-water underline underline-offset-3">
          Back to sign-in
        </Link>
      }
    >
      <ForgotPasswordForm action={askForResetAction} />
    </AccountCard>
  );
}

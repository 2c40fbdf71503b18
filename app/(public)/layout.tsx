import Link from "next/link";
import type { ReactNode } from "react";
import { PublicShell } from "@/components/layout/public-shell";
import { buttonVariants } from "@/components/ui/button";

export default function PublicLayout({ children }: { children: ReactNode }) {
  return (
    <PublicShell
      actions={
        <Link href="/sign-in" className={buttonVariants({ variant: "quiet", size: "small" })}>
          Sign in
        </Link>
      }
    >
      {children}
    </PublicShell>
  );
}

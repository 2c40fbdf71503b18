import type { Metadata } from "next";
import Link from "next/link";
import { EmptyState } from "@/components/layout/empty-state";
import { PublicShell } from "@/components/layout/public-shell";
import { Sheet } from "@/components/layout/sheet";
import { buttonVariants } from "@/components/ui/button";

export const metadata: Metadata = { title: "Not found" };

export default function NotFound() {
  return (
    <PublicShell>
      <Sheet>
        <h1 className="sr-only">Not found</h1>
        <EmptyState
          title="There is nothing at this address"
          text="The page does not exist, or it belongs to a team you are not a member of. Check the address, or switch the team."
          action={
            <Link href="/cases" className={buttonVariants({ variant: "main" })}>
              Go to the cases
            </Link>
          }
        />
      </Sheet>
    </PublicShell>
  );
}

import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { OutboxLetter } from "@/components/auth/outbox-letter";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { PublicShell } from "@/components/layout/public-shell";
import { Sheet } from "@/components/layout/sheet";
import { readOutbox } from "@/lib/use-cases/read-outbox";

export const metadata: Metadata = { title: "Outbox", robots: { index: false } };

export default async function OutboxPage() {
  const letters = await readOutbox();
  if (letters === null) notFound();
  return (
    <PublicShell>
      <Sheet>
        <PageTitle title="Outbox" below="Letters of this installation. They are kept here and sent to nobody." />
        {letters.length === 0 ? (
          <EmptyState title="No letters yet" text="Invite somebody or ask for a new password; the letter appears here within seconds." />
        ) : (
          <ol className="grid grid-cols-1 gap-4">
            {letters.map((letter) => (
              <li key={letter.id}>
                <OutboxLetter letter={letter} />
              </li>
            ))}
          </ol>
        )}
      </Sheet>
    </PublicShell>
  );
}

import Link from "next/link";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { Sheet } from "@/components/layout/sheet";
import { Button } from "@/components/ui/button";

/** A case, edition or draft that is absent, or belongs to another team: both look the same. */
export default function DeskNotFound() {
  return (
    <Sheet>
      <PageTitle title="Not found" />
      <EmptyState title="Your team has nothing at this address" text="It may belong to another team of yours: change the team in the band, or look among the cases." action={<Button asChild><Link href="/cases">Go to the cases</Link></Button>} />
    </Sheet>
  );
}

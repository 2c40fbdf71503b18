import Link from "next/link";
import { MarginSection } from "@/components/layout/sheet";
import type { NearestCase } from "@/lib/advice/advice";

/** The recorded cases most like this one, by name. */
export function NearestCases({ nearest }: { nearest: readonly NearestCase[] }) {
  if (nearest.length === 0) return null;
  return (
    <MarginSection title="Nearest past cases">
      <ul className="grid gap-2">
        {nearest.map((one) => (
          <li key={one.id}>
            <Link href={`/cases/${one.number}`} className="prose-link font-medium">
              {one.number}. {one.title === "" ? "untitled" : one.title}
            </Link>
            <span className="block text-faint">{one.text}</span>
          </li>
        ))}
      </ul>
    </MarginSection>
  );
}

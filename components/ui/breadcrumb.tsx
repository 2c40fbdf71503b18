import Link from "next/link";

/** The way back up. The last step is the page itself and has no link. */
export function Breadcrumb({ steps }: { steps: readonly { label: string; href?: string }[] }) {
  return (
    <nav aria-label="Breadcrumb" data-screen-only>
      <ol className="flex flex-wrap gap-x-2 text-sm text-faint">
        {steps.map((step, index) => (
          <li key={step.label} className="flex gap-2">
            {index > 0 && <span aria-hidden>/</span>}
            {step.href === undefined ? (
              <span aria-current="page">{step.label}</span>
            ) : (
              <Link href={step.href} className="prose-link">
                {step.label}
              </Link>
            )}
          </li>
        ))}
      </ol>
    </nav>
  );
}

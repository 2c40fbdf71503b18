/** The first stop of the Tab key: past the band, to the work. */
export function SkipLink({ target = "work" }: { target?: string }) {
  return (
    <a href={`#${target}`} className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-50 focus:bg-ink focus:px-4 focus:py-2 focus:text-sheet">
      Skip to the work
    </a>
  );
}

/** Says on every page of a demonstration team that nothing in it happened. */
export function DemonstrationRibbon() {
  return (
    <aside aria-label="About this team" className="border-b border-dashed border-contour bg-wash px-4 py-1 text-center text-sm text-ink">
      Demonstration data: invented
    </aside>
  );
}

/** Whether two plain values are equal as JSON, whatever the order of their keys (the database keeps its own). */
export function sameContent(first: unknown, second: unknown): boolean {
  return canonical(first) === canonical(second);
}

function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, inner: unknown) =>
    inner !== null && typeof inner === "object" && !Array.isArray(inner) ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1))) : inner,
  );
}

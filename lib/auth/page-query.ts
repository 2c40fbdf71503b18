/** A page's query as Next hands it over. */
export type PageQuery = Record<string, string | string[] | undefined>;

/** The named parameters that are there once; a repeated one counts as missing. */
export function readQuery<Name extends string>(query: PageQuery, names: readonly Name[]): Partial<Record<Name, string>> {
  const found: Partial<Record<Name, string>> = {};
  for (const name of names) {
    const value = query[name];
    if (typeof value === "string") found[name] = value;
  }
  return found;
}

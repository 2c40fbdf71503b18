"use client";

import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { useCallback, useMemo } from "react";

/** Filters kept in the address: those of the known names that are set, and a way to change some ("" removes one). */
export function useAddressFilter(names: readonly string[]): [Readonly<Record<string, string>>, (changes: Readonly<Record<string, string>>) => void] {
  const router = useRouter();
  const pathname = usePathname();
  const search = useSearchParams();
  const filter = useMemo(() => {
    const entries = names.flatMap((name) => {
      const value = search.get(name);
      return value === null || value === "" ? [] : [[name, value] as const];
    });
    return Object.fromEntries(entries);
  }, [names, search]);
  const change = useCallback(
    (changes: Readonly<Record<string, string>>) => {
      const next = new URLSearchParams(search);
      for (const [name, value] of Object.entries(changes)) {
        if (value === "") next.delete(name);
        else next.set(name, value);
      }
      const text = next.toString();
      router.replace(text === "" ? pathname : `${pathname}?${text}`, { scroll: false });
    },
    [router, pathname, search],
  );
  return [filter, change];
}

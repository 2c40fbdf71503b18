"use client";

import { useInfiniteQuery } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useDeferredValue, useState } from "react";
import { FindDialog, type FindItem } from "@/components/layout/find-dialog";
import { casesQuery } from "@/lib/queries/cases";

const pages: readonly FindItem[] = [
  { id: "/cases", label: "Cases", group: "Pages" },
  { id: "/cases/new", label: "New case", group: "Pages" },
  { id: "/hit-rates", label: "Hit rates", group: "Pages" },
  { id: "/rulebook", label: "Rulebook", group: "Pages" },
  { id: "/machines", label: "Machines", group: "Pages" },
  { id: "/team", label: "Team", group: "Pages" },
  { id: "/account", label: "Account", group: "Pages" },
];
const mostCases = 20;

/** Pages by name at once, cases by number or title from the team's own. */
export function DeskFindDialog({ open, onOpenChange }: { open: boolean; onOpenChange: (open: boolean) => void }) {
  const router = useRouter();
  const [text, setText] = useState("");
  const wanted = useDeferredValue(text.trim());
  const query = useInfiniteQuery({ ...casesQuery({ q: wanted }), enabled: open && wanted !== "" });
  const found = wanted === "" ? [] : (query.data?.pages.flatMap((page) => page.items) ?? []);
  const items: FindItem[] = [
    ...pages.filter((page) => page.label.toLowerCase().includes(wanted.toLowerCase())),
    ...found.slice(0, mostCases).map((entry) => ({ id: `/cases/${entry.number}`, label: entry.title, group: "Cases", hint: `case ${entry.number}` })),
  ];

  function change(next: boolean): void {
    setText("");
    onOpenChange(next);
  }

  return (
    <FindDialog
      open={open}
      onOpenChange={change}
      items={items}
      onSearch={setText}
      busy={query.isFetching}
      onChoose={(item) => {
        change(false);
        router.push(item.id);
      }}
    />
  );
}

"use client";

import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { DifferenceList } from "@/components/rulebook/difference-list";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SkeletonLines } from "@/components/ui/skeleton";
import { problemText } from "@/lib/queries/call-api";
import { changesQuery } from "@/lib/queries/rulebook";

/** What the edition shown changed in the one before it; fetched when it is opened. */
export function EditionChanges({ number }: { number: number }) {
  const [open, setOpen] = useState(false);
  const { data, error, refetch } = useQuery({ ...changesQuery(number), enabled: open });
  if (number === 1) return null;
  return (
    <details className="border border-hairline px-4 py-3" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="text-sm font-semibold">What edition {number} changed in edition {number - 1}</summary>
      <div className="pt-3">
        {error !== null ? (
          <Notice tone="bad" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>
        ) : data === undefined ? (
          <SkeletonLines lines={3} label="Loading the changes" />
        ) : (
          <DifferenceList differences={data.differences} none="Nothing: both say the same." />
        )}
      </div>
    </details>
  );
}

"use client";

import { useMutation } from "@tanstack/react-query";
import { FileUp, History, PenLine } from "lucide-react";
import { useRouter } from "next/navigation";
import { useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { ApiProblem, callApi, problemText } from "@/lib/queries/call-api";

type Begin = { from: "live" } | { from: "edition"; number: number } | { from: "import"; edition: unknown } | { from: "proposal"; search: string; key: string };

/** Makes a draft and opens it. */
export function useStartDraft() {
  const router = useRouter();
  return useMutation({
    mutationFn: (body: Begin) => callApi<{ id: string }>("/rulebook/drafts", { method: "POST", body }),
    onSuccess: ({ id }) => router.push(`/rulebook/drafts/${id}`),
  });
}

/** For curators: a draft from the edition that is shown (to change or to roll back to), or from a file. */
export function StartDraft({ edition, live }: { edition: number; live: boolean }) {
  const start = useStartDraft();
  const file = useRef<HTMLInputElement>(null);
  const [unreadable, setUnreadable] = useState<string | null>(null);
  async function read(chosen: File | undefined): Promise<void> {
    if (chosen === undefined) return;
    setUnreadable(null);
    try {
      const content: unknown = JSON.parse(await chosen.text());
      start.mutate({ from: "import", edition: content });
    } catch (error) {
      setUnreadable(`${chosen.name} is not JSON: ${error instanceof Error ? error.message : "unreadable"}`);
    }
  }
  return (
    <>
      {live ? (
        <Button variant="main" disabled={start.isPending} onClick={() => start.mutate({ from: "live" })}><PenLine aria-hidden /> Start a draft</Button>
      ) : (
        <Button variant="main" disabled={start.isPending} onClick={() => start.mutate({ from: "edition", number: edition })}><History aria-hidden /> Roll back to this edition</Button>
      )}
      <Button disabled={start.isPending} onClick={() => file.current?.click()}><FileUp aria-hidden /> Import a file</Button>
      <input
        ref={file}
        type="file"
        accept="application/json,.json"
        className="sr-only"
        tabIndex={-1}
        aria-label="Edition file to import"
        onChange={(event) => {
          void read(event.target.files?.[0]);
          event.target.value = "";
        }}
      />
      {(unreadable !== null || start.error !== null) && (
        <div className="w-full">
          <StartRefusal message={unreadable} error={start.error} />
        </div>
      )}
    </>
  );
}

function StartRefusal({ message, error }: { message: string | null; error: unknown }) {
  const fields = error instanceof ApiProblem ? error.fields : [];
  return (
    <Notice tone="bad" announce title="No draft was made">
      <p>{message ?? problemText(error)}</p>
      {message === null && fields.length > 0 && (
        <ul tabIndex={0} aria-label="What does not fit" className="grid max-h-48 gap-1 overflow-y-auto">
          {fields.map(({ path, message: text }, index) => (
            <li key={index}><span className="font-mono text-xs">{path}</span> {text}</li>
          ))}
        </ul>
      )}
    </Notice>
  );
}

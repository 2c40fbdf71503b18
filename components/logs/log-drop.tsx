"use client";

import { FileUp } from "lucide-react";
import { useId, useRef, useState, type DragEvent } from "react";
import { Button } from "@/components/ui/button";
import { cn } from "@/components/ui/cn";
import { Field } from "@/components/ui/field";
import { Textarea } from "@/components/ui/textarea";

type LogDropProps = { busy: boolean; onLog: (log: Blob, name: string) => void };

/** Takes a solver's log: dropped, chosen or pasted. */
export function LogDrop({ busy, onLog }: LogDropProps) {
  const [over, setOver] = useState(false);
  const [pasted, setPasted] = useState("");
  const [pasting, setPasting] = useState(false);
  const chooser = useRef<HTMLInputElement>(null);
  const chooserId = useId();

  function drop(event: DragEvent): void {
    event.preventDefault();
    setOver(false);
    const [file] = event.dataTransfer.files;
    if (file !== undefined && !busy) onLog(file, file.name);
  }

  return (
    <div className="grid gap-3">
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={cn("flex flex-wrap items-center gap-3 border border-dashed px-4 py-3", over ? "border-ink bg-wash" : "border-contour")}
      >
        <FileUp aria-hidden className="size-5 text-faint" />
        <p className="min-w-0 grow text-sm">
          <label htmlFor={chooserId} className="font-semibold">Drop a log</label> of the solver here, and the form fills itself. Text or .gz, up to 256 MiB.
        </p>
        <input
          ref={chooser}
          id={chooserId}
          type="file"
          className="sr-only"
          disabled={busy}
          onChange={(event) => {
            const file = event.target.files?.[0];
            if (file !== undefined) onLog(file, file.name);
            // The same file, changed meanwhile, can be chosen again.
            event.target.value = "";
          }}
        />
        <Button size="small" disabled={busy} onClick={() => chooser.current?.click()}>Choose a file</Button>
        <Button size="small" variant="quiet" disabled={busy} aria-expanded={pasting} onClick={() => setPasting(!pasting)}>Paste text</Button>
      </div>
      {pasting && (
        <div className="grid gap-2">
          <Field label="Text of the log" help="From the first residual to the last line of the summary, as far as you have it.">
            <Textarea rows={6} className="font-mono text-xs" spellCheck={false} value={pasted} onChange={(event) => setPasted(event.target.value)} />
          </Field>
          <div>
            {/* A line that was pasted whole ends like one: selecting rarely takes the last end of line along. */}
            <Button size="small" disabled={busy || pasted.trim() === ""} onClick={() => onLog(new Blob([pasted, "\n"]), "pasted text")}>Read it</Button>
          </div>
        </div>
      )}
      <p role="status" className={busy ? "text-sm text-faint" : "sr-only"}>{busy ? "Reading the log." : ""}</p>
    </div>
  );
}

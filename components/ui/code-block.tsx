"use client";

import { Check, Copy, Download } from "lucide-react";
import { useState } from "react";
import { Button } from "./button";
import { cn } from "./cn";

type CodeBlockProps = { title: string; code: string; /** With it a download button is shown. */ fileName?: string; className?: string };

/** A file's text with buttons that copy and download it. */
export function CodeBlock({ title, code, fileName, className }: CodeBlockProps) {
  const [said, setSaid] = useState("");

  async function copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(code);
      setSaid("Copied.");
    } catch {
      setSaid("The browser refused to copy. Select the text and copy it by hand.");
    }
  }

  return (
    <figure className={cn("min-w-0 border border-hairline", className)}>
      <figcaption className="flex flex-wrap items-center justify-between gap-2 border-b border-hairline px-3 py-1.5">
        <span className="font-mono text-sm font-semibold">{title}</span>
        <span className="flex items-center gap-1" data-screen-only>
          <span role="status" className="text-xs text-faint">
            {said}
          </span>
          <Button variant="quiet" size="small" onClick={() => void copy()} aria-label={`Copy ${title}`}>
            {said === "Copied." ? <Check aria-hidden /> : <Copy aria-hidden />} Copy
          </Button>
          {fileName !== undefined && (
            <Button variant="quiet" size="small" onClick={() => downloadText(fileName, code)} aria-label={`Download ${fileName}`}>
              <Download aria-hidden /> Download
            </Button>
          )}
        </span>
      </figcaption>
      <pre tabIndex={0} aria-label={title} className="overflow-x-auto bg-wash px-3 py-3 text-sm leading-6 print:whitespace-pre-wrap">
        <code>{code}</code>
      </pre>
    </figure>
  );
}

/** Hands a text to the browser as a file. */
export function downloadText(fileName: string, text: string, type = "text/plain;charset=utf-8"): void {
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement("a");
  link.href = address;
  link.download = fileName;
  link.click();
  URL.revokeObjectURL(address);
}

"use client";

import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Sheet } from "./sheet";

/** A page that failed: what is known, and a way on. The private detail stays in the server's log under the reference. */
export function ErrorSheet({ reference, onRetry }: { reference?: string; onRetry: () => void }) {
  return (
    <Sheet>
      <h1 className="text-2xl font-semibold">This page could not be shown</h1>
      <Notice
        tone="bad"
        announce
        title="The server failed while preparing it"
        action={
          <Button variant="main" onClick={onRetry}>
            Try again
          </Button>
        }
      >
        <p>Nothing you had saved is lost. If trying again does not help, give the reference to whoever runs this server.</p>
        {reference !== undefined && (
          <p>
            Reference: <code>{reference}</code>
          </p>
        )}
      </Notice>
    </Sheet>
  );
}

"use client";

import { Check, Send, Trash2, Undo2 } from "lucide-react";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Textarea } from "@/components/ui/textarea";
import type { DraftView } from "@/lib/api/contract/drafts";
import { formatDateTime } from "@/lib/shared/format-date";

export type DraftStep = { step: "submit"; note: string } | { step: "withdraw" } | { step: "publish" } | { step: "discard" };

type ApprovalBarProps = { draft: DraftView; /** There are changes that were not saved. */ unsaved: boolean; errors: number; busy: boolean; mayEdit: boolean; onStep: (step: DraftStep) => void };

/** What can be done with a draft as a whole: submit it, take it back, approve it, put it away. */
export function ApprovalBar({ draft, unsaved, errors, busy, mayEdit, onStep }: ApprovalBarProps) {
  const [asking, setAsking] = useState<"submit" | "publish" | "discard" | null>(null);
  const done = (step: DraftStep) => {
    setAsking(null);
    onStep(step);
  };
  if (!mayEdit || (draft.status !== "open" && draft.status !== "submitted")) return null;
  const blocked = unsaved ? "Save your changes first." : errors > 0 ? `${errors === 1 ? "One error" : `${errors} errors`} must be mended first.` : null;
  const mayPublish = draft.approval === "approve" || draft.approval === "alone";
  return (
    <div className="flex flex-wrap items-center gap-2" data-screen-only>
      {draft.status === "open" ? (
        <Button variant="main" disabled={busy || blocked !== null} title={blocked ?? undefined} onClick={() => setAsking("submit")}><Send aria-hidden /> Submit for approval</Button>
      ) : (
        <>
          {mayPublish && <Button variant="main" disabled={busy} onClick={() => setAsking("publish")}><Check aria-hidden /> {draft.approval === "alone" ? "Publish" : "Approve and publish"}</Button>}
          <Button disabled={busy} onClick={() => onStep({ step: "withdraw" })}><Undo2 aria-hidden /> {draft.approval === "approve" ? "Send back for changes" : "Withdraw the submission"}</Button>
        </>
      )}
      <Button variant="quiet" disabled={busy} onClick={() => setAsking("discard")}><Trash2 aria-hidden /> Discard</Button>
      {draft.status === "open" && blocked !== null && <span className="text-sm text-faint">{blocked}</span>}
      {asking === "submit" && <SubmitDialog onClose={() => setAsking(null)} onSubmit={(note) => done({ step: "submit", note })} />}
      {asking === "publish" && (
        <AskDialog title={`Publish as the next edition?`} text={`It replaces edition ${draft.live}: new advice follows it at once, advice already given stays as it was, and the team is told by mail.${draft.approval === "alone" ? " You are the only one who may approve; the edition will say so." : ""}`} verb="Publish" onClose={() => setAsking(null)} onYes={() => done({ step: "publish" })} />
      )}
      {asking === "discard" && <AskDialog title="Discard this draft?" text="It can still be read, but no longer changed or published." verb="Discard" onClose={() => setAsking(null)} onYes={() => done({ step: "discard" })} />}
    </div>
  );
}

/** Who submitted it, when and why; and what it waits for. */
export function SubmissionNotice({ draft }: { draft: DraftView }) {
  if (draft.status !== "submitted") return null;
  const waits: Record<DraftView["approval"], string> = {
    approve: "Read what changes, then approve it or send it back.",
    alone: "Nobody else in the team may approve it: you can publish it alone, and the edition says so.",
    another: "Another curator or an owner approves it.",
    no: "A curator or an owner approves it.",
  };
  return (
    <Notice title={`Submitted by ${draft.submittedBy?.name ?? "a former member"} on ${formatDateTime(draft.submittedAt)}`}>
      <p>{draft.note}</p>
      <p className="text-faint">{waits[draft.approval]}</p>
    </Notice>
  );
}

function SubmitDialog({ onClose, onSubmit }: { onClose: () => void; onSubmit: (note: string) => void }) {
  const [note, setNote] = useState("");
  const [error, setError] = useState<string | undefined>(undefined);
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()}>
      <DialogContent>
        <DialogTitle>Submit for approval</DialogTitle>
        <DialogDescription>The note goes with the edition, into the mail to the team and the list of editions.</DialogDescription>
        <Field label="Note" help="What changes, and why." error={error}>
          <Textarea value={note} maxLength={2000} onChange={(event) => setNote(event.target.value)} />
        </Field>
        <DialogActions>
          <Button onClick={onClose}>Not yet</Button>
          <Button variant="main" onClick={() => (note.trim() === "" ? setError("Say in a sentence what the draft is for.") : onSubmit(note.trim()))}>Submit</Button>
        </DialogActions>
      </DialogContent>
    </Dialog>
  );
}

function AskDialog({ title, text, verb, onClose, onYes }: { title: string; text: string; verb: string; onClose: () => void; onYes: () => void }) {
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()}>
      <DialogContent>
        <DialogTitle>{title}</DialogTitle>
        <DialogDescription>{text}</DialogDescription>
        <DialogActions>
          <Button onClick={onClose}>Not now</Button>
          <Button variant="main" onClick={onYes}>{verb}</Button>
        </DialogActions>
      </DialogContent>
    </Dialog>
  );
}

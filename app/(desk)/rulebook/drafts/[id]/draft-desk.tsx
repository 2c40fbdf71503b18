"use client";

import { Save } from "lucide-react";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState, type ComponentProps } from "react";
import { PageTitle } from "@/components/layout/page-title";
import { Sheet } from "@/components/layout/sheet";
import { ApprovalBar, SubmissionNotice } from "@/components/rulebook/approval-bar";
import { ConflictNotice } from "@/components/rulebook/conflict-notice";
import { DifferenceList } from "@/components/rulebook/difference-list";
import { DraftStatusBadge, draftOriginText } from "@/components/rulebook/draft-status";
import { RulesEditor } from "@/components/rulebook/editor/rules-editor";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { notify } from "@/components/ui/notify";
import { Notice } from "@/components/ui/notice";
import { Tabs, TabsContent, TabsList, TabsTrigger } from "@/components/ui/tabs";
import type { DraftView } from "@/lib/api/contract/drafts";
import { ApiProblem, problemText } from "@/lib/queries/call-api";
import { formatDateTime } from "@/lib/shared/format-date";
import { ReplaySection } from "./replay-section";
import { TrySection } from "./try-section";
import { useDraftEditor, type DraftEditor } from "./use-draft-editor";

type DraftDeskProps = { initial: DraftView; catalogue: ComponentProps<typeof RulesEditor>["catalogue"]; mayEdit: boolean };

/** One draft: edit, see what changes, replay, submit, approve. */
export function DraftDesk({ initial, catalogue, mayEdit }: DraftDeskProps) {
  const router = useRouter();
  const editor = useDraftEditor(initial, (number) => {
    notify(`Edition ${number} is live.`, "success");
    router.push(`/rulebook?edition=${number}`);
    router.refresh();
  });
  const [sound, setSound] = useState(true);
  const { saved, state, unsaved } = editor;
  const readOnly = !mayEdit || saved.status !== "open";
  return (
    <Sheet>
      <PageTitle
        above={
          <span className="flex flex-wrap items-center gap-2 text-sm text-faint">
            <Link href="/rulebook" className="prose-link">Rulebook</Link> <DraftStatusBadge status={saved.status} />
          </span>
        }
        title={editor.title === "" ? "Draft" : editor.title}
        below={<DraftLine draft={saved} unsaved={unsaved} />}
        actions={
          !readOnly && (
            <Button disabled={!unsaved || !sound || editor.save.busy || editor.conflict !== null} onClick={editor.save.run}>
              <Save aria-hidden /> {editor.save.busy ? "Saving" : "Save"}
            </Button>
          )
        }
      />
      <SubmissionNotice draft={saved} />
      {editor.conflict !== null && (
        <ConflictNotice message={editor.conflict.message} mine={state.rules} theirs={editor.conflict.theirs?.rules ?? null} onTakeTheirs={() => editor.resolve("theirs")} onKeepMine={() => editor.resolve("mine")} />
      )}
      <Refusal error={editor.save.refusal} title="The draft was not saved" />
      <Refusal error={editor.step.refusal} title="That was not done" />
      <ApprovalBar draft={saved} unsaved={unsaved} errors={unsaved ? 0 : saved.problems.filter(({ severity }) => severity === "error").length} busy={editor.step.busy} mayEdit={mayEdit} onStep={editor.step.run} />
      <DraftTabs editor={editor} catalogue={catalogue} readOnly={readOnly} mayEdit={mayEdit} onSound={setSound} />
    </Sheet>
  );
}

type DraftTabsProps = Pick<DraftDeskProps, "catalogue" | "mayEdit"> & { editor: DraftEditor; readOnly: boolean; onSound: (sound: boolean) => void };

function DraftTabs({ editor, catalogue, readOnly, mayEdit, onSound }: DraftTabsProps) {
  const { saved, state, unsaved } = editor;
  return (
    <Tabs defaultValue={saved.status === "submitted" ? "changes" : "rules"}>
      <TabsList aria-label="Parts of the draft">
        <TabsTrigger value="rules">Rules</TabsTrigger>
        <TabsTrigger value="changes">What changes ({saved.differences.length})</TabsTrigger>
        <TabsTrigger value="replay">Replay</TabsTrigger>
      </TabsList>
      <TabsContent value="rules" className="grid gap-6">
        {!readOnly && (
          <Field label="Title of the draft" className="max-w-xl">
            <Input value={editor.title} maxLength={160} onChange={(event) => editor.setTitle(event.target.value)} />
          </Field>
        )}
        <RulesEditor
          state={state}
          dispatch={editor.dispatch}
          catalogue={catalogue}
          readOnly={readOnly}
          onSound={onSound}
          tryPanel={(rule, free) => <TrySection rules={state.rules} rule={rule} free={free} />}
        />
      </TabsContent>
      <TabsContent value="changes" className="grid gap-4">
        <p className="text-sm text-faint">Against edition {saved.live}, the live one, as the draft was saved last{unsaved ? "; save to see your latest changes here" : ""}.</p>
        <DifferenceList differences={saved.differences} none={`The draft says the same as edition ${saved.live}.`} />
      </TabsContent>
      <TabsContent value="replay">
        <ReplaySection draft={saved} mayStart={mayEdit && (saved.status === "open" || saved.status === "submitted")} unsaved={unsaved} />
      </TabsContent>
    </Tabs>
  );
}

function DraftLine({ draft, unsaved }: { draft: DraftView; unsaved: boolean }) {
  return (
    <>
      Version {draft.version}, {draftOriginText(draft)}; saved by {draft.updatedBy?.name ?? "a former member"} on {formatDateTime(draft.updatedAt)}.{" "}
      <span role="status" className="font-medium text-ink">{unsaved ? "Changes not saved yet." : ""}</span>
      {draft.publishedAs !== null && <Link className="prose-link" href={`/rulebook?edition=${draft.publishedAs}`}>Published as edition {draft.publishedAs}</Link>}
    </>
  );
}

function Refusal({ error, title }: { error: unknown; title: string }) {
  if (error === null || error === undefined) return null;
  const fields = error instanceof ApiProblem ? error.fields.slice(0, 8) : [];
  return (
    <Notice tone="bad" announce title={title}>
      <p>{problemText(error)}</p>
      {fields.length > 0 && (
        <ul className="grid gap-1">
          {fields.map(({ path, message }) => (
            <li key={`${path}-${message}`}><span className="font-mono text-xs">{path}</span> {message}</li>
          ))}
        </ul>
      )}
    </Notice>
  );
}

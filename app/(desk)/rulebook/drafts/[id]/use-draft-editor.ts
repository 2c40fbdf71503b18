"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useEffect, useMemo, useReducer, useState } from "react";
import { reduceEditor, startEditor, type EditorAction, type EditorState } from "@/components/rulebook/editor/editor-state";
import type { DraftStep } from "@/components/rulebook/approval-bar";
import { notify } from "@/components/ui/notify";
import type { DraftView } from "@/lib/api/contract/drafts";
import { ApiProblem, callApi, problemText } from "@/lib/queries/call-api";
import { rulebookKeys } from "@/lib/queries/rulebook";

export type Conflict = { message: string; theirs: DraftView | null };

export type DraftEditor = {
  /** As it was saved last, as far as this window knows. */
  saved: DraftView;
  title: string;
  setTitle: (title: string) => void;
  state: EditorState;
  dispatch: (action: EditorAction) => void;
  unsaved: boolean;
  conflict: Conflict | null;
  resolve: (choice: "mine" | "theirs") => void;
  save: { run: () => void; busy: boolean; refusal: unknown };
  step: { run: (step: DraftStep) => void; busy: boolean; refusal: unknown };
};

/** A draft in one window: edits kept here until they are saved, saves that name the version they began from, and what to do when they are late. */
export function useDraftEditor(initial: DraftView, onPublished: (number: number) => void): DraftEditor {
  const queryClient = useQueryClient();
  const [saved, setSaved] = useState(initial);
  const [title, setTitle] = useState(initial.title);
  const [state, dispatch] = useReducer(reduceEditor, initial.rules, startEditor);
  const [conflict, setConflict] = useState<Conflict | null>(null);
  const unsaved = useMemo(() => title !== saved.title || state.rules !== saved.rules, [title, state.rules, saved]);
  useLeavingWarning(unsaved);

  const save = useMutation({
    mutationFn: ({ rules }: { rules: DraftView["rules"] }) => callApi<DraftView>(`/rulebook/drafts/${saved.id}`, { method: "PATCH", body: { version: saved.version, title, rules } }),
    onSuccess: async (draft, { rules }) => {
      // The rules as they are here: what was typed while the answer came is then still a change.
      setSaved({ ...draft, rules });
      setConflict(null);
      await queryClient.invalidateQueries({ queryKey: rulebookKeys.all });
      notify(`Saved as version ${draft.version}.`, "success");
    },
    onError: async (error) => {
      if (!(error instanceof ApiProblem) || error.status !== 409) return;
      setConflict({ message: error.message, theirs: null });
      const theirs = await callApi<DraftView>(`/rulebook/drafts/${saved.id}`).catch(() => null);
      setConflict({ message: error.message, theirs });
    },
  });
  const step = useMutation({
    mutationFn: async (wanted: DraftStep) => {
      const { step: name, ...rest } = wanted;
      const bodies = { submit: { version: saved.version, ...rest }, publish: { version: saved.version, replacing: saved.live }, withdraw: undefined, discard: undefined } as const;
      const body = bodies[name];
      const path = `/rulebook/drafts/${saved.id}/${name}`;
      if (name === "publish") return { published: (await callApi<{ number: number }>(path, { method: "POST", body })).number, draft: null };
      return { published: null, draft: await callApi<DraftView>(path, { method: "POST", ...(body === undefined ? {} : { body }) }) };
    },
    onSuccess: async ({ published, draft }) => {
      await queryClient.invalidateQueries();
      if (draft !== null) setSaved((before) => ({ ...draft, rules: before.rules }));
      if (published !== null) onPublished(published);
    },
    onError: async (error) => {
      notify(problemText(error), "error");
      // The draft moved on under another hand: show where it stands.
      const now = await callApi<DraftView>(`/rulebook/drafts/${saved.id}`).catch(() => null);
      if (now !== null && now.version === saved.version) setSaved((before) => ({ ...now, rules: before.rules }));
    },
  });

  function resolve(choice: "mine" | "theirs"): void {
    const theirs = conflict?.theirs ?? null;
    if (theirs === null) return;
    setSaved(theirs);
    setConflict(null);
    save.reset();
    if (choice === "mine") return;
    setTitle(theirs.title);
    dispatch({ type: "edit", rules: theirs.rules });
  }

  return {
    saved,
    title,
    setTitle,
    state,
    dispatch,
    unsaved,
    conflict,
    resolve,
    save: { run: () => save.mutate({ rules: state.rules }), busy: save.isPending, refusal: conflict === null ? save.error : null },
    step: { run: (wanted) => step.mutate(wanted), busy: step.isPending, refusal: step.error },
  };
}

/** The browser asks before a window with unsaved changes is closed. */
function useLeavingWarning(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", ask);
    return () => window.removeEventListener("beforeunload", ask);
  }, [unsaved]);
}

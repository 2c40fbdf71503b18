"use client";

import { useState, useSyncExternalStore } from "react";
import { formValuesSchema, type FormValues } from "@/lib/questionnaire/form-values";

/** Drafts stay in the browser: one a team and origin. A private window without storage simply keeps none. */
function nameOf(team: string, origin: string): string {
  return `saddlemark.draft.${team}.${origin}`;
}

export function writeDraft(team: string, origin: string, values: FormValues): void {
  try {
    window.localStorage.setItem(nameOf(team, origin), JSON.stringify(values));
  } catch {
    // Full or forbidden storage: the form still works, the draft is just not kept.
  }
}

export function clearDraft(team: string, origin: string): void {
  try {
    window.localStorage.removeItem(nameOf(team, origin));
  } catch {
    // Nothing was kept, so there is nothing to clear.
  }
}

function readDraft(team: string, origin: string): FormValues | null {
  try {
    const text = window.localStorage.getItem(nameOf(team, origin));
    if (text === null) return null;
    const parsed = formValuesSchema.safeParse(JSON.parse(text));
    return parsed.success ? parsed.data : null;
  } catch {
    return null;
  }
}

const never = () => () => undefined;

/** The draft as it was when the page opened; undefined on the server and until the browser has taken over. */
export function useDraft(team: string, origin: string): FormValues | null | undefined {
  const inBrowser = useSyncExternalStore(never, () => true, () => false);
  const [draft, setDraft] = useState<FormValues | null | undefined>(undefined);
  if (inBrowser && draft === undefined) setDraft(readDraft(team, origin));
  return draft;
}

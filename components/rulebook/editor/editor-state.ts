import type { RuleSet } from "@/rules/rule-schema";

/** Rules in the making with what can be undone and redone. `selected` is the place of the rule shown. */
export type EditorState = {
  rules: RuleSet;
  selected: number;
  past: readonly Snapshot[];
  future: readonly Snapshot[];
  /** Names what the last edit changed; further edits of the same are undone with it. */
  merging: string | null;
};
type Snapshot = { rules: RuleSet; selected: number };

export type EditorAction =
  | { type: "edit"; rules: RuleSet; selected?: number; /** Edits under one name in a row are one step to undo. */ merge?: string }
  | { type: "select"; index: number }
  | { type: "undo" }
  | { type: "redo" };

const mostSteps = 200;

export function startEditor(rules: RuleSet): EditorState {
  return { rules, selected: 0, past: [], future: [], merging: null };
}

/** The state after an action; the same object where nothing changes. */
export function reduceEditor(state: EditorState, action: EditorAction): EditorState {
  switch (action.type) {
    case "select":
      return action.index === state.selected ? state : { ...state, selected: inside(action.index, state.rules), merging: null };
    case "edit":
      return edit(state, action);
    case "undo":
      return step(state, state.past, "past");
    case "redo":
      return step(state, state.future, "future");
  }
}

function edit(state: EditorState, { rules, selected = state.selected, merge }: Extract<EditorAction, { type: "edit" }>): EditorState {
  if (rules === state.rules) return state;
  const merged = merge !== undefined && merge === state.merging;
  const past = merged ? state.past : [...state.past.slice(-mostSteps + 1), { rules: state.rules, selected: state.selected }];
  return { rules, selected: inside(selected, rules), past, future: [], merging: merge ?? null };
}

function step(state: EditorState, from: readonly Snapshot[], side: "past" | "future"): EditorState {
  const target = from.at(-1);
  if (target === undefined) return state;
  const here = { rules: state.rules, selected: state.selected };
  const rest = from.slice(0, -1);
  return { ...target, past: side === "past" ? rest : [...state.past, here], future: side === "past" ? [...state.future, here] : rest, merging: null };
}

function inside(index: number, rules: RuleSet): number {
  return Math.max(0, Math.min(index, rules.length - 1));
}

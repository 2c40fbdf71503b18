"use client";

import { useDeferredValue, useEffect, useMemo, useState, type ReactNode } from "react";
import { Tabs, TabsContent, TabsList, TabsTrigger } from "@/components/ui/tabs";
import type { Rule } from "@/rules/rule-schema";
import type { EditorAction, EditorState } from "./editor-state";
import { blankRule, insertRule, moveRule, removeRule, replaceRule } from "./rule-edits";
import { RuleForm } from "./rule-form";
import { RuleJson } from "./rule-json";
import { RuleList, type ListAction } from "./rule-list";
import { ProblemProvider, problemsOf, type ParameterCatalogue, type RuleProblem } from "./rule-problems";

type RulesEditorProps = {
  state: EditorState;
  dispatch: (action: EditorAction) => void;
  catalogue: ParameterCatalogue;
  readOnly: boolean;
  /** Told whether the rules can be saved as they stand: not while the JSON box holds no rule. */
  onSound: (sound: boolean) => void;
  /** The panel that tries the rules on a case; gets the chosen rule, and whether the rules are free of errors. */
  tryPanel: (rule: Rule | null, sound: boolean) => ReactNode;
};

/** Rules on the left, the chosen one as a form, and beside it the same rule as JSON or tried on a case. All three agree at any time. */
export function RulesEditor({ state, dispatch, catalogue, readOnly, onSound, tryPanel }: RulesEditorProps) {
  const { rules, selected } = state;
  const [jsonBroken, setJsonBroken] = useState(false);
  const problems = useProblems(rules, catalogue);
  const rule = rules[selected] ?? null;
  const setBroken = (broken: boolean) => {
    setJsonBroken(broken);
    onSound(!broken);
  };
  const act = (action: EditorAction) => {
    setBroken(false);
    dispatch(action);
  };
  const onList = (action: ListAction) => {
    const next = listEdit(state, action);
    if (next !== null) act(next);
  };
  useUndoKeys(readOnly ? null : act);
  const change = (next: Rule, merge?: string) => {
    if (next !== rule) dispatch({ type: "edit", rules: replaceRule(rules, selected, next), ...(merge === undefined ? {} : { merge }) });
  };
  return (
    <ProblemProvider problems={problems}>
      <div className="grid min-w-0 items-start gap-x-6 gap-y-8 lg:grid-cols-[16rem_minmax(0,1fr)] 2xl:grid-cols-[17rem_minmax(0,1fr)_25rem]">
        <RuleList rules={rules} selected={selected} problems={problems} possible={readOnly ? new Set() : possibleActions(state)} onSelect={(index) => act({ type: "select", index })} onAction={onList} />
        {rule === null ? (
          <p className="text-sm text-faint">There is no rule. Advice then follows the model and the record alone.</p>
        ) : (
          <div className="grid min-w-0 gap-3">
            <h2 className="sr-only">{rule.title === "" ? rule.id : rule.title}</h2>
            {jsonBroken && <p role="status" className="text-sm font-medium text-bad">The form waits: what stands in the JSON box is not a rule.</p>}
            <RuleForm key={selected} rule={rule} path={String(selected)} catalogue={catalogue} disabled={readOnly || jsonBroken} onChange={change} />
          </div>
        )}
        <Tabs defaultValue="json" className="min-w-0 lg:col-start-2 2xl:col-start-3">
          <TabsList aria-label="Beside the rule">
            <TabsTrigger value="json">JSON</TabsTrigger>
            <TabsTrigger value="try">Try it</TabsTrigger>
          </TabsList>
          <TabsContent value="json">
            {rule !== null && (
              <RuleJson
                rule={rule}
                catalogue={catalogue}
                readOnly={readOnly}
                onChange={(next) => {
                  setBroken(next === null);
                  if (next !== null) change(next, `${selected}.json`);
                }}
              />
            )}
          </TabsContent>
          <TabsContent value="try">{tryPanel(rule, !problems.some(({ severity }) => severity === "error"))}</TabsContent>
        </Tabs>
      </div>
    </ProblemProvider>
  );
}

/** Problems a moment behind the typing, so that large editions stay quick to type in. */
export function useProblems(rules: EditorState["rules"], catalogue: ParameterCatalogue): readonly RuleProblem[] {
  const settled = useDeferredValue(rules);
  return useMemo(() => problemsOf(settled, catalogue), [settled, catalogue]);
}

function possibleActions({ rules, selected, past, future }: EditorState): ReadonlySet<ListAction> {
  const possible: Record<ListAction, boolean> = {
    add: rules.length < 500,
    copy: rules.length > 0 && rules.length < 500,
    delete: rules.length > 0,
    up: selected > 0,
    down: selected < rules.length - 1,
    undo: past.length > 0,
    redo: future.length > 0,
  };
  return new Set(actionsIn(possible));
}

function actionsIn(possible: Record<ListAction, boolean>): ListAction[] {
  const all: ListAction[] = ["add", "copy", "delete", "up", "down", "undo", "redo"];
  return all.filter((action) => possible[action]);
}

function listEdit({ rules, selected }: EditorState, action: ListAction): EditorAction | null {
  const rule = rules[selected];
  switch (action) {
    case "undo":
    case "redo":
      return { type: action };
    case "add":
      return { type: "edit", rules: insertRule(rules, selected, blankRule), selected: rules.length === 0 ? 0 : selected + 1 };
    case "copy":
      return rule === undefined ? null : { type: "edit", rules: insertRule(rules, selected, rule), selected: selected + 1 };
    case "delete":
      return rule === undefined ? null : { type: "edit", rules: removeRule(rules, selected), selected };
    case "up":
      return { type: "edit", rules: moveRule(rules, selected, selected - 1), selected: selected - 1 };
    case "down":
      return { type: "edit", rules: moveRule(rules, selected, selected + 1), selected: selected + 1 };
  }
}

/** Ctrl or Cmd with Z, and with Shift or Y, wherever the focus is not in a box with an undo of its own. */
function useUndoKeys(act: ((action: EditorAction) => void) | null): void {
  useEffect(() => {
    if (act === null) return;
    const onKeyDown = (event: KeyboardEvent) => {
      const key = event.key.toLowerCase();
      if (!(event.ctrlKey || event.metaKey) || (key !== "z" && key !== "y")) return;
      if (event.target instanceof HTMLElement && event.target.matches("input:not([type=checkbox]), textarea")) return;
      event.preventDefault();
      act({ type: key === "y" || event.shiftKey ? "redo" : "undo" });
    };
    window.addEventListener("keydown", onKeyDown);
    return () => window.removeEventListener("keydown", onKeyDown);
  }, [act]);
}

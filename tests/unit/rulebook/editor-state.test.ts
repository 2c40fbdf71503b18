import { describe, expect, it } from "vitest";
import { reduceEditor, startEditor, type EditorAction, type EditorState } from "@/components/rulebook/editor/editor-state";
import { blankRule, freeId, insertRule, moveRule, removeRule, replaceRule } from "@/components/rulebook/editor/rule-edits";
import { firstEdition } from "@/rules/sets/first-edition";

const after = (state: EditorState, ...actions: EditorAction[]) => actions.reduce(reduceEditor, state);
const titled = (title: string) => replaceRule(firstEdition, 0, { ...firstEdition[0], ...blankRule, title });

describe("the editor's history", () => {
  const start = startEditor(firstEdition);

  it("undoes and redoes edit by edit, back to the very same rules", () => {
    const edited = after(start, { type: "edit", rules: titled("one") }, { type: "edit", rules: titled("two") });
    const back = after(edited, { type: "undo" }, { type: "undo" });
    expect(back.rules).toBe(firstEdition);
    expect(after(back, { type: "redo" }, { type: "redo" }).rules).toEqual(edited.rules);
  });

  it("takes edits of one field in a row as one step, until another rule is chosen", () => {
    const typed = after(start, { type: "edit", rules: titled("a"), merge: "0.title" }, { type: "edit", rules: titled("ab"), merge: "0.title" });
    expect(after(typed, { type: "undo" }).rules).toBe(firstEdition);
    const again = after(typed, { type: "select", index: 1 }, { type: "select", index: 0 }, { type: "edit", rules: titled("abc"), merge: "0.title" });
    expect(after(again, { type: "undo" }).rules).toEqual(titled("ab"));
  });

  it("forgets what could be redone once something else is edited", () => {
    const state = after(start, { type: "edit", rules: titled("one") }, { type: "undo" }, { type: "edit", rules: titled("other") });
    expect(after(state, { type: "redo" })).toBe(state);
  });

  it("shows the rule again that an undone edit belonged to", () => {
    const state = after(start, { type: "select", index: 3 }, { type: "edit", rules: removeRule(firstEdition, 3), selected: 3 }, { type: "select", index: 7 });
    expect(after(state, { type: "undo" }).selected).toBe(3);
  });

  it("changes nothing with nothing to undo or redo, and never chooses a rule that is not there", () => {
    expect(after(start, { type: "undo" })).toBe(start);
    expect(after(start, { type: "redo" })).toBe(start);
    expect(after(start, { type: "select", index: 10_000 }).selected).toBe(firstEdition.length - 1);
    expect(after(start, { type: "edit", rules: [] }).selected).toBe(0);
  });
});

describe("edits of the list", () => {
  it("gives a new or copied rule an id of its own", () => {
    const once = insertRule(firstEdition, 0, blankRule);
    const twice = insertRule(once, 0, blankRule);
    expect(twice.slice(1, 3).map(({ id }) => id)).toEqual(["new-rule-2", "new-rule"]);
    expect(freeId(twice, "new-rule-2")).toBe("new-rule-3");
    expect(new Set(twice.map(({ id }) => id)).size).toBe(twice.length);
  });

  it.each([
    [0, 1, "down"],
    [2, 0, "to the front"],
  ])("moves the rule at %i to %i", (from, to) => {
    const moved = moveRule(firstEdition, from, to);
    expect(moved[to]).toBe(firstEdition[from]);
    expect([...moved].sort((a, b) => a.id.localeCompare(b.id))).toEqual([...firstEdition].sort((a, b) => a.id.localeCompare(b.id)));
  });

  it("leaves the list as it is when a rule would move beyond its ends", () => {
    expect(moveRule(firstEdition, 0, -1)).toBe(firstEdition);
    expect(moveRule(firstEdition, firstEdition.length - 1, firstEdition.length)).toBe(firstEdition);
  });
});

// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { useEffect, useReducer } from "react";
import { afterEach, describe, expect, it } from "vitest";
import { reduceEditor, startEditor } from "@/components/rulebook/editor/editor-state";
import { RulesEditor } from "@/components/rulebook/editor/rules-editor";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { ruleSetSchema, type Rule, type RuleSet } from "@/rules/rule-schema";
import { violations } from "../../support/axe";

afterEach(cleanup);

const rules: RuleSet = [
  {
    id: "low-order",
    title: "Low order first",
    enabled: true,
    when: { all: [{ fact: "degree", operator: "lessThanInclusive", value: 2 }, { not: { any: [{ fact: "meshFamily", operator: "in", value: ["voronoi"] }, { fact: "cores", operator: "greaterThan", value: 256 }] } }] },
    then: [{ kind: "favour", strategy: "schur-diag-direct", factor: 1.3 }],
    rationale: "As the trade does.",
    source: { kind: "common-practice" },
  },
  {
    id: "no-blr",
    title: "No compression here",
    enabled: false,
    when: { fact: "memoryTotalGiB", operator: "greaterThan", value: 64 },
    then: [{ kind: "exclude", strategy: "direct-blr", reason: "for the test" }],
    rationale: "A test.",
    source: { kind: "published", citation: "A paper" },
  },
];

let present: RuleSet = rules;
const keep = (shown: RuleSet): void => void (present = shown);

function Host({ readOnly = false }: { readOnly?: boolean }) {
  const [state, dispatch] = useReducer(reduceEditor, rules, startEditor);
  useEffect(() => keep(state.rules), [state.rules]);
  return <RulesEditor state={state} dispatch={dispatch} catalogue={parameterCatalogue} readOnly={readOnly} onSound={() => undefined} tryPanel={() => null} />;
}

const jsonBox = () => screen.getByLabelText<HTMLTextAreaElement>("This rule as JSON");
const json = (): unknown => JSON.parse(jsonBox().value);
const first = (): Rule | undefined => present[0];

describe("the form and the JSON beside it", () => {
  it("begin alike", () => {
    render(<Host />);
    expect(json()).toEqual(rules[0]);
    expect(screen.getByLabelText<HTMLInputElement>("Title").value).toBe("Low order first");
    expect(screen.getByRole("group", { name: "Group: none of these holds" })).toBeDefined();
  });

  it("agree after each change in the form", async () => {
    const user = userEvent.setup();
    render(<Host />);
    const title = screen.getByLabelText("Title");
    await user.clear(title);
    await user.type(title, "Other words");
    const [threshold] = screen.getAllByLabelText("Value");
    if (threshold === undefined) throw new Error("No threshold.");
    await user.clear(threshold);
    await user.type(threshold, "3");
    await user.selectOptions(screen.getAllByLabelText("How the conditions are joined")[0] ?? title, "any");
    await user.click(screen.getByLabelText("voronoi-relaxed"));
    expect(first()).toMatchObject({ title: "Other words", when: { any: [{ value: 3 }, { not: { any: [{ value: ["voronoi", "voronoi-relaxed"] }, {}] } }] } });
    expect(json()).toEqual(first());
    expect(ruleSetSchema.safeParse(present).success).toBe(true);
  });

  it("agree after a change in the JSON, and the form keeps the last rule while the text is none", () => {
    render(<Host />);
    fireEvent.change(jsonBox(), { target: { value: JSON.stringify({ ...rules[0], title: "From the JSON", when: { fact: "cores", operator: "equal", value: 7 } }) } });
    expect(screen.getByLabelText<HTMLInputElement>("Title").value).toBe("From the JSON");
    expect(first()?.when).toEqual({ fact: "cores", operator: "equal", value: 7 });
    fireEvent.change(jsonBox(), { target: { value: '{"id": "half' } });
    expect(screen.getByText(/This is not JSON/)).toBeDefined();
    expect(screen.getByLabelText<HTMLInputElement>("Title").matches(":disabled")).toBe(true);
    expect(first()?.title).toBe("From the JSON");
    fireEvent.click(screen.getByRole("button", { name: "Put the form's rule back" }));
    expect(json()).toEqual(first());
    expect(screen.getByLabelText<HTMLInputElement>("Title").matches(":disabled")).toBe(false);
  });

  it("say where JSON does not fit", () => {
    render(<Host />);
    fireEvent.change(jsonBox(), { target: { value: JSON.stringify({ ...rules[0], then: [{ kind: "favour", strategy: "direct-ldlt", factor: 1000 }] }) } });
    expect(screen.getByText(/^then\.0\.factor:/)).toBeDefined();
  });
});

it("breaks no rule of accessibility that can be told without a layout", async () => {
  render(<Host />);
  expect(await violations()).toEqual([]);
});

describe("problems", () => {
  it("stand at their place as they are made", async () => {
    const user = userEvent.setup();
    render(<Host />);
    const [threshold] = screen.getAllByLabelText("Value");
    if (threshold === undefined) throw new Error("No threshold.");
    await user.clear(threshold);
    await user.type(threshold, "0");
    expect(await screen.findByText("This condition can never be true.")).toBeDefined();
    expect(screen.getByText("1 error")).toBeDefined();
    fireEvent.change(screen.getByLabelText("Rationale"), { target: { value: "" } });
    expect(await screen.findByText("1 error")).toBeDefined();
    expect(screen.getByLabelText("Rationale").getAttribute("aria-invalid")).toBe("true");
  });
});

describe("the list", () => {
  it("adds, copies, orders, deletes, undoes and redoes by buttons and keys", async () => {
    const user = userEvent.setup();
    render(<Host />);
    await user.click(screen.getByRole("button", { name: "Copy this rule" }));
    expect(present.map(({ id }) => id)).toEqual(["low-order", "low-order-2", "no-blr"]);
    screen.getByRole("button", { current: true }).focus();
    await user.keyboard("{Alt>}{ArrowDown}{/Alt}");
    expect(present.map(({ id }) => id)).toEqual(["low-order", "no-blr", "low-order-2"]);
    await user.click(screen.getByRole("button", { name: "Delete this rule" }));
    await user.click(screen.getByRole("button", { name: "Add a rule" }));
    expect(present.map(({ id }) => id)).toEqual(["low-order", "no-blr", "new-rule"]);
    for (let step = 0; step < 4; step++) await user.click(screen.getByRole("button", { name: "Undo" }));
    expect(present).toBe(rules);
    screen.getByRole("button", { current: true }).focus();
    await user.keyboard("{Control>}y{/Control}");
    expect(present).toHaveLength(3);
    await user.keyboard("{Control>}z{/Control}");
    expect(present).toBe(rules);
  });

  it("finds a rule by its words", async () => {
    const user = userEvent.setup();
    render(<Host />);
    await user.type(screen.getByLabelText("Find a rule"), "compression");
    expect(screen.getByText("1 of 2 rules")).toBeDefined();
  });
});

describe("for somebody who may only read", () => {
  it("nothing can be changed", () => {
    render(<Host readOnly />);
    expect(screen.queryByRole("toolbar")).toBeNull();
    expect(screen.getByLabelText("Title").matches(":disabled")).toBe(true);
    expect(jsonBox().readOnly).toBe(true);
  });
});

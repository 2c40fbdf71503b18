// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it } from "vitest";
import { ProposalCard } from "@/components/rulebook/proposal-card";
import { ReplayReport } from "@/components/rulebook/replay-report";
import { RuleBrowser } from "@/components/rulebook/rule-browser";
import { TraceTree } from "@/components/rulebook/trace-tree";
import { ratesOf } from "@/lib/hit-rates/rates";
import type { Proposal } from "@/lib/refinement/proposal-schema";
import type { ReplayResult } from "@/lib/refinement/replay-result";
import { firstEdition } from "@/rules/sets/first-edition";
import { violations } from "../../support/axe";

afterEach(cleanup);

const test = { n: 3, onlyBefore: 1, onlyAfter: 2, pValue: 1, text: "This can well be chance." };
const result: ReplayResult = {
  cases: 4,
  judged: { before: 4, after: 3, both: 3 },
  contested: 3,
  before: ratesOf([]),
  after: ratesOf([]),
  tests: { worked: test, best: test },
  changed: { cases: 2, helped: 1, hurt: 1, unknown: 0 },
  changes: [
    { caseId: "a", number: 7, before: "bddc", after: "direct-ldlt", verdict: "helped", timeRatio: 0.5, text: "Both worked: 4 s instead of 8 s.", rules: ["one"] },
    { caseId: "b", number: 8, before: "bddc", after: null, verdict: "hurt", timeRatio: null, text: "The draft lets no strategy compete.", rules: [] },
  ],
};

describe("a replay's report", () => {
  it("says what changed, case by case with the rule that did it, and filters by verdict", async () => {
    const user = userEvent.setup();
    render(<ReplayReport result={result} editionNumber={3} titleOf={(id) => `Rule ${id}`} />);
    expect(screen.getByText("2 in all: 1 helped, 1 hurt, 0 unknown because the runs can't tell.")).toBeDefined();
    expect(screen.getByRole("cell", { name: "Rule one" })).toBeDefined();
    expect(screen.getAllByText("This can well be chance.")).toHaveLength(2);
    await user.click(screen.getByRole("radio", { name: "hurt" }));
    expect(screen.queryByRole("link", { name: "7" })).toBeNull();
    expect(screen.getByRole("link", { name: "8" }).getAttribute("href")).toBe("/cases/8");
    expect(await violations()).toEqual([]);
  });
});

const [oneRule] = firstEdition;
if (oneRule === undefined) throw new Error("The first edition has rules.");
const figures = { best: { x: 20, n: 40, low: 0.35, high: 0.65 }, regret: 1.8 };
const proposal: Proposal = {
  key: "k", kind: "switch-off", ruleId: oneRule.id, change: { kind: "switch-off" }, formerRule: oneRule, rule: { ...oneRule, enabled: false }, words: "Switch the rule off.", sameCasesAs: null,
  evidence: { casesFor: 9, casesAgainst: 1, casesUnknown: 2, cases: [{ caseId: "a", number: 7, before: "bddc", after: "direct-ldlt", saves: 2 }], heldOut: { folds: 5, cases: 40, before: figures, after: { ...figures, regret: 1.2 } }, pValue: 0.004 },
};

describe("a proposal", () => {
  it("shows cases for and against, the held-out effect and the corrected probability, and one button", async () => {
    let made = 0;
    render(<ProposalCard proposal={proposal} rival={null} busy={false} onDraft={() => (made += 1)} />);
    expect(screen.getByText(/Cases for it:/).textContent).toBe("Cases for it: 9, against: 1, unknown because not both first choices were run: 2. Corrected for all candidates searched, p = 0.004.");
    expect(screen.getByText("1.2x")).toBeDefined();
    await userEvent.click(screen.getByRole("button", { name: "Make it a draft" }));
    expect(made).toBe(1);
  });

  it("offers nothing to those who may not edit", () => {
    render(<ProposalCard proposal={proposal} rival={null} busy={false} onDraft={null} />);
    expect(screen.queryByRole("button")).toBeNull();
  });
});

describe("the list of rules", () => {
  it("is filtered by words and by strategy", async () => {
    const user = userEvent.setup();
    render(<RuleBrowser rules={firstEdition} fired={{}} records={{}} />);
    await user.selectOptions(screen.getByLabelText("Strategy"), "bddc");
    const about = firstEdition.filter(({ then }) => then.some((effect) => effect.strategy === "bddc" || (effect.kind === "fallback" && effect.to === "bddc")));
    expect(screen.getByRole("status").textContent).toBe(`${about.length} of ${firstEdition.length} rules`);
    expect(about.length).toBeGreaterThan(0);
    await user.type(screen.getByLabelText("Words"), "no rule says this");
    expect(screen.getByText("No rule fits this filter.")).toBeDefined();
    await user.click(screen.getByRole("button", { name: "Clear the filter" }));
    expect(screen.getAllByRole("article")).toHaveLength(firstEdition.length);
    expect(await violations()).toEqual([]);
  });
});

describe("a condition on a case", () => {
  // Kleene's strong tables: false and unknown is false, true or unknown is true.
  it("shows which part holds, which fails and which can't be known, each with the fact's value", () => {
    render(<TraceTree facts={{ degree: 2 }} condition={{ all: [{ fact: "degree", operator: "equal", value: 2 }, { any: [{ fact: "degree", operator: "equal", value: 3 }, { fact: "cores", operator: "greaterThan", value: 1 }] }] }} />);
    const texts = screen.getAllByRole("listitem").map((item) => item.firstElementChild?.textContent);
    expect(texts).toEqual(["unknown: all of these", "holds: degree is 2; here 2", "unknown: any of these", "fails: degree is 3; here 2", "unknown: cores are more than 1; here not known"]);
  });
});

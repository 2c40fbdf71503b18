// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { DraftDesk } from "@/app/(desk)/rulebook/drafts/[id]/draft-desk";
import type { DraftView } from "@/lib/api/contract/drafts";
import type { RuleSet } from "@/rules/rule-schema";

const pushed: string[] = [];
vi.mock("next/navigation", () => ({ useRouter: () => ({ push: (path: string) => pushed.push(path), refresh: () => undefined }) }));

const rules: RuleSet = [
  { id: "one", title: "The one rule", enabled: true, when: { fact: "degree", operator: "equal", value: 1 }, then: [{ kind: "favour", strategy: "bddc", factor: 2 }], rationale: "A test.", source: { kind: "common-practice" } },
];

const curator = { id: "c", name: "Corvin" };
const draft: DraftView = {
  id: "11111111-1111-4111-8111-111111111111", title: "From edition 1", basedOn: 1, version: 1, status: "open", origin: "live", note: "", rules,
  createdBy: curator, createdAt: "2026-12-01T08:00:00.000Z", updatedBy: curator, updatedAt: "2026-12-01T08:00:00.000Z", submittedBy: null, submittedAt: null, publishedAs: null,
  problems: [], live: 1, differences: [], approval: "no",
};

type Sent = { method: string; path: string; body: unknown };
const sent: Sent[] = [];
let answers: ((call: Sent) => [status: number, body: unknown])[] = [];

beforeEach(() => {
  sent.length = 0;
  pushed.length = 0;
  answers = [];
  vi.stubGlobal("fetch", (path: string, init: RequestInit) => {
    const call = { method: init.method ?? "GET", path, body: typeof init.body === "string" ? JSON.parse(init.body) : null };
    sent.push(call);
    const [status, body] = answers.shift()?.(call) ?? [500, {}];
    return Promise.resolve(new Response(JSON.stringify(body), { status, headers: { "content-type": "application/json" } }));
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(view: DraftView = draft, mayEdit = true) {
  const catalogue = { "direct-ldlt": {}, "direct-blr": {}, "schur-diag-direct": {}, "schur-diag-amg": {}, "schur-triangular": {}, "regularized-amg": {}, "hdiv-auxiliary": {}, "hybridized-amg": {}, bddc: {}, "schwarz-two-level": {}, "p-multigrid": {} };
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <DraftDesk initial={view} catalogue={catalogue} mayEdit={mayEdit} />
    </QueryClientProvider>,
  );
}

const problem = (detail: string) => ({ type: "urn:saddlemark:problem:conflict", title: "Conflict", status: 409, detail, errors: [] });
const button = (name: RegExp | string) => screen.getByRole("button", { name });

describe("saving", () => {
  it("sends the version that the changes began from, and the next save begins from the one answered", async () => {
    const user = userEvent.setup();
    show();
    expect(button("Save").matches(":disabled")).toBe(true);
    await user.type(screen.getByLabelText("Rationale"), "!");
    answers = [({ body }) => [200, { ...draft, ...rulesOf(body), version: 2 }]];
    await user.click(button("Save"));
    await waitFor(() => expect(button("Save").matches(":disabled")).toBe(true));
    expect(sent[0]).toMatchObject({ method: "PATCH", path: `/api/v1/rulebook/drafts/${draft.id}`, body: { version: 1, rules: [{ rationale: "A test.!" }] } });
    await user.type(screen.getByLabelText("Rationale"), "?");
    answers = [({ body }) => [200, { ...draft, ...rulesOf(body), version: 3 }]];
    await user.click(button("Save"));
    await waitFor(() => expect(sent).toHaveLength(2));
    expect(sent[1]?.body).toMatchObject({ version: 2 });
  });

  it("that comes too late keeps the text here, shows who was first, and saves over theirs only when told to", async () => {
    const user = userEvent.setup();
    show();
    await user.type(screen.getByLabelText("Title of the draft"), " mine");
    const theirs = { ...draft, title: "Theirs", version: 2 };
    answers = [() => [409, problem("Olive saved version 2.")], () => [200, theirs]];
    await user.click(button("Save"));
    expect(await screen.findByText(/Olive saved version 2\. Your changes are still here\./)).toBeDefined();
    expect(screen.getByLabelText<HTMLInputElement>("Title of the draft").value).toBe("From edition 1 mine");
    expect(button("Save").matches(":disabled")).toBe(true);
    await user.click(await screen.findByRole("button", { name: /Keep mine/ }));
    answers = [() => [200, { ...draft, title: "From edition 1 mine", version: 3 }]];
    await user.click(button("Save"));
    await waitFor(() => expect(sent).toHaveLength(3));
    expect(sent[2]?.body).toMatchObject({ version: 2, title: "From edition 1 mine" });
  });

  it("that comes too late can give way to theirs", async () => {
    const user = userEvent.setup();
    show();
    await user.clear(screen.getByLabelText("Rationale"));
    await user.type(screen.getByLabelText("Rationale"), "Mine.");
    const theirs = { ...draft, version: 2, rules: rules.map((rule) => ({ ...rule, rationale: "Theirs." })) };
    answers = [() => [409, problem("Olive saved version 2.")], () => [200, theirs]];
    await user.click(button("Save"));
    await user.click(await screen.findByRole("button", { name: /Take theirs/ }));
    expect(screen.getByLabelText<HTMLTextAreaElement>("Rationale").value).toBe("Theirs.");
    expect(button("Save").matches(":disabled")).toBe(true);
    await user.click(button("Undo"));
    expect(screen.getByLabelText<HTMLTextAreaElement>("Rationale").value).toBe("Mine.");
  });
});

function rulesOf(body: unknown): { rules: RuleSet } {
  return typeof body === "object" && body !== null && "rules" in body && Array.isArray(body.rules) ? { rules: body.rules } : { rules };
}

describe("approval", () => {
  it("names the live edition whose difference was read, and goes to the edition published", async () => {
    const user = userEvent.setup();
    show({ ...draft, status: "submitted", submittedBy: { id: "o", name: "Olive" }, submittedAt: "2026-12-01T09:00:00.000Z", note: "Please read.", approval: "approve", live: 4 });
    expect(screen.getByText("Please read.")).toBeDefined();
    answers = [() => [201, { number: 5 }]];
    await user.click(button("Approve and publish"));
    await user.click(await screen.findByRole("button", { name: "Publish" }));
    await waitFor(() => expect(pushed).toEqual(["/rulebook?edition=5"]));
    expect(sent[0]).toMatchObject({ path: `/api/v1/rulebook/drafts/${draft.id}/publish`, body: { version: 1, replacing: 4 } });
  });

  it.each([
    ["the submitter", { approval: "another" as const }, true],
    ["a reader", { approval: "no" as const }, false],
  ])("is not offered to %s", (_who, change, mayEdit) => {
    show({ ...draft, status: "submitted", submittedAt: "2026-12-01T09:00:00.000Z", ...change }, mayEdit);
    expect(screen.queryByRole("button", { name: /publish/i })).toBeNull();
  });

  it("waits while there are changes that were not saved", async () => {
    const user = userEvent.setup();
    show();
    await user.type(screen.getByLabelText("Rationale"), "!");
    expect(button("Submit for approval").matches(":disabled")).toBe(true);
    expect(screen.getByText("Save your changes first.")).toBeDefined();
  });
});

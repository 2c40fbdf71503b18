import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { parseEdition } from "@/rules/edition-json-schema";
import type { Rule, RuleSet } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";
import { createdCase, startApiWorld, type ApiWorld, type CallOptions } from "../support/api";

let world: ApiWorld;
const base = "/api/v1/rulebook";
const draftSchema = operations.getDraft.response.schema;
const editionSchema = operations.publishDraft.response.schema;

beforeAll(async () => {
  world = await startApiWorld();
});
afterAll(() => world.close());

const begin = (body: object = { from: "live" }, as: CallOptions["as"] = "curator") => world.expect(201, draftSchema, "POST", `${base}/drafts`, { as, body });
const read = (id: string, as: CallOptions["as"] = "observer") => world.expect(200, draftSchema, "GET", `${base}/drafts/${id}`, { as });
const save = (id: string, body: object, as: CallOptions["as"] = "curator") => world.call("PATCH", `${base}/drafts/${id}`, { as, body });
const submit = (id: string, version: number, as: CallOptions["as"] = "curator") => world.call("POST", `${base}/drafts/${id}/submit`, { as, body: { version, note: "For the test." } });
const publish = (id: string, version: number, replacing: number, as: CallOptions["as"] = "owner") => world.call("POST", `${base}/drafts/${id}/publish`, { as, body: { version, replacing } });
const liveNumber = async (as: CallOptions["as"] = "owner") => (await world.expect(200, operations.getEdition.response.schema, "GET", `${base}/editions/live`, { as })).number;
const lastAudit = async (as: CallOptions["as"] = "owner") => (await world.expect(200, operations.listAudit.response.schema, "GET", "/api/v1/audit?limit=1", { as })).items[0];

const excludeDirect: Rule = {
  id: "no-direct-here",
  title: "No direct solver here",
  enabled: true,
  when: { fact: "degree", operator: "greaterThanInclusive", value: 1 },
  then: [{ kind: "exclude", strategy: "schur-diag-direct", reason: "for the test" }],
  rationale: "A test.",
  source: { kind: "common-practice" },
};

/** From a live edition to the next, changed by `change`, in two persons' hands. */
async function publishNext(change: (rules: RuleSet) => RuleSet): Promise<number> {
  const draft = await begin();
  expect((await save(draft.id, { version: 1, rules: change(draft.rules) })).status).toBe(200);
  expect((await submit(draft.id, 2)).status).toBe(200);
  const answer = await publish(draft.id, 2, await liveNumber());
  expect(answer.status, answer.text).toBe(201);
  return editionSchema.parse(answer.json()).number;
}

describe("a draft", () => {
  it("starts from the live edition and says so in the audit list", async () => {
    const draft = await begin();
    expect(draft).toMatchObject({ title: "From edition 1", basedOn: 1, version: 1, status: "open", origin: "live", differences: [], createdBy: { name: "The curator" } });
    expect(draft.rules).toEqual(firstEdition);
    expect(await lastAudit()).toMatchObject({ action: "draft.created", subjectId: draft.id, actor: { name: "The curator" } });
  });

  it("shows its problems where they are, and what it would change", async () => {
    const draft = await begin();
    const rules = [...draft.rules, { ...excludeDirect, when: { fact: "degree", operator: "lessThan", value: 1 } }];
    const saved = draftSchema.parse((await save(draft.id, { version: 1, rules })).json());
    expect(saved.problems).toContainEqual({ path: `${draft.rules.length}.when`, message: "This condition can never be true.", severity: "error" });
    expect(saved.differences).toMatchObject([{ ruleId: "no-direct-here", kind: "added" }]);
    const refused = await submit(draft.id, 2);
    expect(refused.status).toBe(422);
    expect(refused.problem().errors).toContainEqual({ path: `rules.${draft.rules.length}.when`, message: "This condition can never be true." });
  });

  it("saved by two people from the same version keeps the first save and tells the second who and when", async () => {
    const draft = await begin();
    expect((await save(draft.id, { version: 1, title: "The curator's" }, "curator")).status).toBe(200);
    const late = await save(draft.id, { version: 1, title: "The owner's" }, "owner");
    expect(late.status).toBe(409);
    expect(late.problem().detail).toMatch(/^The curator saved version 2 of this draft on .* UTC; your changes began from version 1\. Nothing was saved over it\.$/);
    expect(await read(draft.id)).toMatchObject({ title: "The curator's", version: 2 });
  });

  it("saved 20 times at once from the same version is saved once", async () => {
    const draft = await begin();
    const answers = await Promise.all(Array.from({ length: 20 }, (_, index) => save(draft.id, { version: 1, title: `Save ${index}` }, index % 2 === 0 ? "owner" : "curator")));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, ...Array.from({ length: 19 }, () => 409)]);
    expect((await read(draft.id)).version).toBe(2);
  });

  it("that does not fit the form is refused with the place of every misfit", async () => {
    const draft = await begin();
    const rules = [{ ...excludeDirect, title: "" }, { ...excludeDirect, id: "second", when: { all: [{ fact: "degree", operator: "about", value: 1 }] } }];
    const answer = await save(draft.id, { version: 1, rules });
    expect(answer.status).toBe(422);
    expect(answer.problem().errors.map(({ path }) => path)).toEqual(["rules.0.title", "rules.1.when.all.0.operator"]);
    expect((await read(draft.id)).version).toBe(1);
  });

  it("nested ten thousand deep is refused in words", async () => {
    const draft = await begin();
    const deep = `${'{"not":'.repeat(10_000)}{"fact":"degree","operator":"equal","value":1}${"}".repeat(10_000)}`;
    const rawBody = JSON.stringify({ version: 1, rules: [{ ...excludeDirect, when: "DEEP" }] }).replace('"DEEP"', deep);
    const answer = await world.call("PATCH", `${base}/drafts/${draft.id}`, { as: "curator", rawBody, headers: { "content-type": "application/json" } });
    expect(answer.status).toBe(422);
    expect(answer.problem().errors[0]?.message).toMatch(/nest at most/);
  });

  it.each(["analyst", "observer", "read-key"] as const)("can be read by %s, not changed", async (as) => {
    const draft = await begin();
    expect((await read(draft.id, as)).approval).toBe("no");
    for (const answer of [await save(draft.id, { version: 1, title: "Mine" }, as), await submit(draft.id, 1, as), await publish(draft.id, 1, 1, as)]) expect(answer.status).toBe(403);
    expect((await world.call("POST", `${base}/drafts`, { as, body: { from: "live" } })).status).toBe(403);
    expect(await read(draft.id)).toMatchObject({ version: 1, status: "open" });
  });

  it("that was submitted is changed by nobody until it is withdrawn", async () => {
    const draft = await begin();
    expect((await submit(draft.id, 1)).status).toBe(200);
    expect((await save(draft.id, { version: 1, title: "Late" }, "owner")).status).toBe(409);
    const open = await world.expect(200, draftSchema, "POST", `${base}/drafts/${draft.id}/withdraw`, { as: "owner" });
    expect(open).toMatchObject({ status: "open", submittedBy: null });
    expect((await save(draft.id, { version: 1, title: "In time" })).status).toBe(200);
    expect((await world.expect(200, draftSchema, "POST", `${base}/drafts/${draft.id}/discard`, { as: "curator" })).status).toBe("discarded");
    expect((await save(draft.id, { version: 2, title: "Too late" })).status).toBe(409);
    const listed = await world.expect(200, operations.listDrafts.response.schema, "GET", `${base}/drafts`, { as: "observer" });
    expect(listed.items.map(({ id }) => id)).not.toContain(draft.id);
  });
});

describe("publication", () => {
  it("takes another person's approval; the edition is numbered, recorded and mailed, and new advice follows it at once", async () => {
    const before = await world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "analyst", body: { questionnaire: defaultQuestionnaire } });
    expect(before.advice.ranking.find(({ strategy }) => strategy === "schur-diag-direct")?.status).toBe("ranked");
    const draft = await begin();
    await save(draft.id, { version: 1, rules: [...draft.rules, excludeDirect] });
    await submit(draft.id, 2);
    expect((await read(draft.id, "curator")).approval).toBe("another");
    expect((await publish(draft.id, 2, 1, "curator")).status).toBe(403);
    expect((await read(draft.id, "owner")).approval).toBe("approve");
    const answer = await publish(draft.id, 2, 1, "owner");
    expect(answer.status, answer.text).toBe(201);
    expect(answer.json()).toMatchObject({ number: 2, live: true, origin: "draft", alone: false, note: "For the test.", submittedBy: { name: "The curator" }, approvedBy: { name: "Olive Owner" } });

    const after = await world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "analyst", body: { questionnaire: defaultQuestionnaire } });
    expect(after.advice.edition.number).toBe(2);
    expect(after.advice.ranking.find(({ strategy }) => strategy === "schur-diag-direct")).toMatchObject({ status: "excluded", reason: "for the test" });
    expect(await lastAudit()).toMatchObject({ action: "case.created" });
    const { rows } = await world.owner.query<{ to: string }>("select data ->> 'to' as to from jobs.job where name = 'send-email' and data ->> 'subject' like 'Edition 2 of the rulebook of Reed team%' order by 1");
    expect(rows.map(({ to }) => to)).toEqual(["analyst@example.org", "curator@example.org", "observer@example.org", "owner@example.org"]);
    const changes = await world.expect(200, operations.compareEditions.response.schema, "GET", `${base}/editions/2/changes`, { as: "observer" });
    expect(changes).toMatchObject({ number: 2, before: 1, differences: [{ ruleId: "no-direct-here", kind: "added" }] });
    expect((await publish(draft.id, 2, 2, "owner")).status).toBe(409);
  });

  it("is refused while another edition than the one that was read is live", async () => {
    const live = await liveNumber();
    const draft = await begin();
    await submit(draft.id, 1);
    await publishNext((rules) => rules.map((rule) => (rule.id === excludeDirect.id ? { ...rule, enabled: false } : rule)));
    const answer = await publish(draft.id, 1, live);
    expect(answer.status).toBe(409);
    expect(answer.problem().detail).toBe(`Edition ${live + 1} went live meanwhile; read what this draft changes in it, then approve again.`);
    expect(await read(draft.id)).toMatchObject({ status: "submitted", live: live + 1, differences: [{ ruleId: "no-direct-here", kind: "changed" }] });
  });

  it("asked for many times at once happens once, and numbers have no hole", async () => {
    const live = await liveNumber();
    const drafts = await Promise.all([1, 2, 3].map(() => begin()));
    for (const { id } of drafts) await submit(id, 1);
    const answers = await Promise.all(drafts.flatMap(({ id }) => [publish(id, 1, live), publish(id, 1, live)]));
    expect(answers.filter(({ status }) => status === 201)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(5);
    expect(await liveNumber()).toBe(live + 1);
    const { items } = await world.expect(200, operations.listEditions.response.schema, "GET", `${base}/editions`);
    expect(items.map(({ number }) => number)).toEqual(Array.from({ length: live + 1 }, (_, index) => live + 1 - index));
  });

  it("of a team's only curator needs nobody else, and the edition says so", async () => {
    const draft = await begin({ from: "live" }, "foreigner");
    expect((await submit(draft.id, 1, "foreigner")).status).toBe(200);
    expect((await read(draft.id, "foreigner")).approval).toBe("alone");
    const answer = await publish(draft.id, 1, 1, "foreigner");
    expect(answer.json()).toMatchObject({ number: 2, alone: true, submittedBy: { name: "Fay Foreign" }, approvedBy: { name: "Fay Foreign" } });
    expect(await lastAudit("foreigner")).toMatchObject({ action: "edition.published", detail: { number: 2, alone: true } });
  });

  it("rolls back by publishing an old edition's rules under a new number", async () => {
    const live = await liveNumber();
    const draft = await begin({ from: "edition", number: 1 });
    expect(draft).toMatchObject({ origin: "rollback:1", basedOn: live });
    await submit(draft.id, 1);
    expect((await publish(draft.id, 1, live)).json()).toMatchObject({ number: live + 1, origin: "rollback:1" });
    const now = await world.expect(200, operations.getEdition.response.schema, "GET", `${base}/editions/live`);
    expect(now.rules).toEqual(firstEdition);
    expect((await world.call("POST", `${base}/drafts`, { as: "curator", body: { from: "edition", number: 99 } })).status).toBe(422);
  });

  // The grants table gives the application no update and no delete on editions; PostgreSQL answers 42501.
  it("leaves editions as they were published", async () => {
    const { rows } = await world.owner.query("select privilege_type from information_schema.role_table_grants where table_name = 'edition' and grantee = 'saddlemark_app' order by 1");
    expect(rows.map(({ privilege_type: name }) => name)).toEqual(["INSERT", "SELECT"]);
  });
});

describe("an edition as a file", () => {
  it("comes back as a draft that says the same", async () => {
    const file = await world.call("GET", `${base}/editions/1/export`, { as: "observer" });
    expect(file.status).toBe(200);
    expect(file.headers.get("content-disposition")).toContain("edition-1.json");
    expect(parseEdition(file.text, parameterCatalogue)).toMatchObject({ ok: true });
    const draft = await begin({ from: "import", edition: file.json(), title: "From a file" });
    expect(draft).toMatchObject({ title: "From a file", origin: "import" });
    expect(draft.rules).toEqual(firstEdition);
  });

  it.each([
    ["another kind of file", { hello: 1 }, "edition.format"],
    ["an unknown fact", { format: "saddlemark-edition", version: 1, rules: [{ ...excludeDirect, when: { fact: "colour", operator: "equal", value: 1 } }] }, "edition.rules.0.when.fact"],
    ["two rules of one id", { format: "saddlemark-edition", version: 1, rules: [excludeDirect, excludeDirect] }, "edition.rules.1.id"],
  ])("that is %s is refused with the place", async (_name, edition, path) => {
    const answer = await world.call("POST", `${base}/drafts`, { as: "curator", body: { from: "import", edition } });
    expect(answer.status).toBe(422);
    expect(answer.problem().errors.map((error) => error.path)).toContain(path);
  });

  it("has a schema that anybody can read", async () => {
    const answer = await world.call("GET", `${base}/edition.schema.json`, { as: "nobody" });
    expect(answer.status).toBe(200);
    expect(answer.json()).toMatchObject({ $id: "http://127.0.0.1:3999/api/v1/rulebook/edition.schema.json", $schema: "https://json-schema.org/draft/2020-12/schema" });
  });
});

describe("trying rules on a case", () => {
  it("shows facts, which conditions hold, and the ranking beside the live one, and saves nothing", async () => {
    const { id } = await world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "analyst", body: { questionnaire: defaultQuestionnaire } });
    const counted = async () => (await world.owner.query("select (select count(*) from advice)::int as advice, (select count(*) from audit)::int as audit")).rows[0];
    const before = await counted();
    const trial = await world.expect(200, operations.tryRules.response.schema, "POST", `${base}/try`, { as: "observer", body: { case: id, rules: [...firstEdition, excludeDirect] } });
    expect(trial.facts).toMatchObject({ degree: 1, meshFamily: "cubes" });
    expect(trial.rules.at(-1)).toEqual({ rule: "no-direct-here", enabled: true, truth: "true", trace: { kind: "comparison", fact: "degree", operator: "greaterThanInclusive", value: 1, factValue: 1, truth: "true" } });
    expect(trial.ranking.map(({ strategy }) => strategy)).not.toContain("schur-diag-direct");
    expect(trial.live.ranking.map(({ strategy }) => strategy)).toContain("schur-diag-direct");
    expect(await counted()).toEqual(before);
  });
});

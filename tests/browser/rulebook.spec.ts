import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { expect, test, type APIRequestContext, type Browser, type Page } from "@playwright/test";
import { plantedCases, plantedEdition } from "../support/planted-record";
import { accountOf, signIn } from "./people";

const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

type Api = { request: APIRequestContext; origin: string };

async function post<Answer>({ request, origin }: Api, path: string, data: unknown): Promise<Answer> {
  const response = await request.post(`/api/v1${path}`, { headers: { origin }, data });
  expect(response.ok(), `${path}: ${response.status()} ${await response.text()}`).toBe(true);
  return response.json();
}

async function register(page: Page, name: string, email: string, team: string | null): Promise<void> {
  await page.getByLabel("Your name").fill(name);
  if (team !== null) await page.getByLabel("E-mail").fill(email);
  await page.getByLabel("Password", { exact: true }).fill(`long-${email}`);
  if (team !== null) await page.getByLabel("Team").fill(team);
  await page.getByRole("button", { name: team === null ? "Register and join" : "Register" }).click();
  await expect(page).toHaveURL(/\/cases/);
}

/** A team of its own with rules whose threshold is wrong, and runs that say so. */
async function plantRecord(api: Api): Promise<void> {
  const draft = await post<{ id: string }>(api, "/rulebook/drafts", { from: "import", edition: plantedEdition });
  await post(api, `/rulebook/drafts/${draft.id}/submit`, { version: 1, note: "Planted for the journey." });
  await post(api, `/rulebook/drafts/${draft.id}/publish`, { version: 1, replacing: 1 });
  const ids: string[] = [];
  for (const { questionnaire } of plantedCases) ids.push((await post<{ id: string }>(api, "/cases", { questionnaire })).id);
  for (const [index, { runs }] of plantedCases.entries()) {
    for (const run of runs) await post(api, `/cases/${ids[index]}/runs`, run);
  }
}

/** A second curator in a browser of their own, by invitation. */
async function inviteCurator(browser: Browser, owner: Page, email: string): Promise<Page> {
  await owner.goto("/team");
  await owner.getByLabel("E-mail of the person to invite").fill(email);
  await owner.getByLabel("Role", { exact: true }).last().selectOption("curator");
  await owner.getByRole("button", { name: "Invite" }).click();
  await expect(owner.getByText(email)).toBeVisible();
  const page = await (await browser.newContext()).newPage();
  const letter = page.getByRole("article").filter({ hasText: email });
  await expect
    .poll(async () => {
      await page.goto("/outbox");
      return letter.count();
    }, { timeout: 30_000 })
    .toBeGreaterThan(0);
  await letter.getByRole("link").first().click();
  await register(page, "Bram Oldacre", email, null);
  return page;
}

const between = plantedCases.find(({ questionnaire }) => questionnaire.size.value > 45_000);

/** First choice and edition for a system between the wrong threshold and the true one. */
async function advised(api: Api): Promise<{ edition: number; first: string | undefined }> {
  const advice = await post<{ edition: { number: number }; ranking: { strategy: string }[] }>(api, "/advice", between?.questionnaire);
  return { edition: advice.edition.number, first: advice.ranking[0]?.strategy };
}

async function expectSound(page: Page): Promise<void> {
  await page.evaluate(axe);
  for (const scheme of ["light", "dark"] as const) {
    await page.emulateMedia({ colorScheme: scheme });
    const found: { id: string; nodes: { target: unknown[]; failureSummary?: string }[] }[] = await page.evaluate("axe.run(document, { resultTypes: ['violations'] }).then((result) => result.violations)");
    expect(found.flatMap(({ id, nodes }) => nodes.map((node) => `${id}: ${node.target.join(" ")} ${node.failureSummary ?? ""}`)), scheme).toEqual([]);
  }
  for (const width of [360, 768, 1440]) {
    await page.setViewportSize({ width, height: 900 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(overflow, `${page.url()} at ${width} px scrolls sideways`).toBeLessThanOrEqual(0);
  }
  await page.setViewportSize({ width: 1280, height: 900 });
}

test("a proposal becomes a draft, is edited, replayed, submitted, approved by another person and followed by new advice; an old edition comes back", async ({ page, browser, baseURL }) => {
  test.setTimeout(300_000);
  const stamp = Date.now().toString(36);
  const api: Api = { request: page.request, origin: new URL(baseURL ?? "").origin };
  await page.goto("/register");
  await register(page, "Oda Fenwright", `rules-${stamp}@journey.example`, `Rule team ${stamp}`);
  await plantRecord(api);
  expect(await advised(api)).toEqual({ edition: 2, first: "schur-diag-direct" });
  const colleague = await inviteCurator(browser, page, `curator-${stamp}@journey.example`);

  // Open a proposal and make it a draft.
  await page.goto("/rulebook");
  await page.getByRole("link", { name: "Proposals" }).click();
  await expect(page.getByRole("heading", { name: "Not searched yet" })).toBeVisible();
  await page.getByRole("button", { name: "Search the record" }).click();
  const proposal = page.getByRole("article").filter({ hasText: "blocks-when-large" }).filter({ hasText: "move a threshold" });
  await expect(proposal).toBeVisible({ timeout: 60_000 });
  await expectSound(page);
  await proposal.getByRole("button", { name: "Make it a draft" }).click();
  await expect(page).toHaveURL(/\/rulebook\/drafts\//);

  // Edit; the form and the JSON agree.
  await page.getByRole("button", { name: /Block preconditioner for large systems/ }).click();
  await page.getByLabel("Rationale").fill("The team's own runs put the threshold higher.");
  await expect(page.getByLabel("This rule as JSON")).toHaveValue(/put the threshold higher/);
  await page.getByRole("tab", { name: "Try it" }).click();
  await page.getByLabel("Case number").fill("10");
  await page.getByRole("button", { name: "Try it" }).click();
  await expect(page.getByText("Under this draft")).toBeVisible();
  await expectSound(page);
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Saved as version 2.")).toBeVisible();

  // Replay.
  await page.getByRole("tab", { name: "Replay" }).click();
  await page.getByRole("button", { name: "Replay this draft" }).click();
  await expect(page.getByRole("heading", { name: "On the same cases" })).toBeVisible({ timeout: 60_000 });
  await expect(page.getByText(/\d+ helped, 0 hurt/)).toBeVisible();
  await expectSound(page);

  // Submit; the submitter can't approve.
  await page.getByRole("button", { name: "Submit for approval" }).click();
  await page.getByRole("dialog").getByLabel("Note").fill("The threshold follows our runs.");
  await page.getByRole("dialog").getByRole("button", { name: "Submit" }).click();
  await expect(page.getByText("Another curator or an owner approves it.")).toBeVisible();
  await expect(page.getByRole("button", { name: /publish/i })).toHaveCount(0);

  // Another person approves.
  await approve(colleague, "The threshold follows our runs.");
  await expect(colleague).toHaveURL(/edition=3/);
  expect(await advised(api)).toEqual({ edition: 3, first: "direct-ldlt" });

  // Roll back.
  await page.goto("/rulebook?edition=2");
  await page.getByRole("button", { name: "Roll back to this edition" }).click();
  await expect(page).toHaveURL(/\/rulebook\/drafts\//);
  await page.getByRole("button", { name: "Submit for approval" }).click();
  await page.getByRole("dialog").getByLabel("Note").fill("Back to the former threshold.");
  await page.getByRole("dialog").getByRole("button", { name: "Submit" }).click();
  await approve(colleague, "Back to the former threshold.");
  await expect(colleague).toHaveURL(/edition=4/);
  expect(await advised(api)).toEqual({ edition: 4, first: "schur-diag-direct" });
  await page.goto("/rulebook");
  await expect(page.getByRole("link", { name: "Edition 4, live, rolls back to 2" })).toBeVisible();
});

async function approve(page: Page, note: string): Promise<void> {
  await page.goto("/rulebook");
  await page.getByRole("listitem").filter({ hasText: "waits for approval" }).getByRole("link").first().click();
  await expect(page.getByText(note)).toBeVisible();
  await page.getByRole("button", { name: "Approve and publish" }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Publish" }).click();
}

test("two windows on one draft: the late save is told who came first, and keeps its own text", async ({ page, browser }) => {
  await signIn(page, accountOf("curator"));
  await page.goto("/rulebook");
  await page.getByRole("button", { name: "Start a draft" }).click();
  await expect(page).toHaveURL(/\/rulebook\/drafts\//);
  const other = await (await browser.newContext()).newPage();
  await signIn(other, accountOf("owner"));
  await other.goto(new URL(page.url()).pathname);
  await other.getByLabel("Title of the draft").fill("The owner's title");
  await other.getByRole("button", { name: "Save", exact: true }).click();
  await expect(other.getByText("Saved as version 2.")).toBeVisible();

  await page.getByLabel("Title of the draft").fill("The curator's title");
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Somebody saved this draft meanwhile")).toBeVisible();
  await expect(page.getByLabel("Title of the draft")).toHaveValue("The curator's title");
  await page.getByRole("button", { name: /Keep mine/ }).click();
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Saved as version 3.")).toBeVisible();
  await page.getByRole("button", { name: "Discard" }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Discard" }).click();
  await expect(page.getByText("discarded", { exact: true })).toBeVisible();
});

test("an observer reads the rulebook and its proposals, and finds nothing to change", async ({ page }) => {
  await signIn(page, accountOf("observer"));
  await page.goto("/rulebook");
  await expect(page.getByRole("button", { name: "Start a draft" })).toHaveCount(0);
  await page.getByLabel("Words").fill("memory");
  await expect(page.getByText(/^\d+ of \d+ rules$/)).toBeVisible();
  await expectSound(page);
  await page.goto("/rulebook/proposals");
  await expect(page.getByRole("heading", { level: 1, name: "Proposals" })).toBeVisible();
  await expect(page.getByRole("button", { name: "Search the record" })).toHaveCount(0);
});

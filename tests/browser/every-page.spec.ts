import { createRequire } from "node:module";
import { readFileSync } from "node:fs";
import { expect, test, type Page } from "@playwright/test";
import { accountOf, signIn } from "./people";

const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

const openPages = ["/", "/sign-in", "/register", "/forgot-password", "/outbox", "/no-such-page"];
const deskPages = ["/cases", "/cases/new", "/cases/1", "/hit-rates", "/rulebook", "/machines", "/team", "/account"];
const widths = [360, 768, 1440];

type Violation = { id: string; nodes: { target: unknown[]; failureSummary?: string }[] };

async function violations(page: Page): Promise<string[]> {
  await page.evaluate(axe);
  const found: Violation[] = await page.evaluate("axe.run(document, { resultTypes: ['violations'] }).then((result) => result.violations)");
  return found.flatMap((violation) => violation.nodes.map((node) => `${violation.id}: ${node.target.join(" ")} ${node.failureSummary ?? ""}`));
}

async function expectSound(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await expect(page.locator("h1")).toHaveCount(1);
  await page.waitForLoadState("networkidle");
  for (const scheme of ["light", "dark"] as const) {
    await page.emulateMedia({ colorScheme: scheme });
    expect(await violations(page), `${path}, ${scheme}`).toEqual([]);
  }
  for (const width of widths) {
    await page.setViewportSize({ width, height: 900 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(overflow, `${path} at ${width} px scrolls sideways`).toBeLessThanOrEqual(0);
  }
  await page.setViewportSize({ width: 1280, height: 900 });
}

for (const path of openPages) {
  test(`${path} is accessible in both themes and fits 360, 768 and 1440 px`, async ({ page }) => {
    await expectSound(page, path);
  });
}

test("every signed-in page is accessible in both themes, fits three widths, and logs no error", async ({ page }) => {
  test.setTimeout(180_000);
  const errors: string[] = [];
  page.on("pageerror", (error) => errors.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") errors.push(message.text());
  });
  await signIn(page, accountOf("owner"));
  for (const path of deskPages) await expectSound(page, path);
  expect(errors).toEqual([]);
});

test("the advice prints on A4 without screen furniture", async ({ page }) => {
  await signIn(page, accountOf("owner"));
  await page.goto("/cases/1");
  await page.emulateMedia({ media: "print" });
  await expect(page.getByRole("button", { name: "Report a run" }).first()).toBeHidden();
  await expect(page.getByRole("heading", { name: "Ranked strategies" })).toBeVisible();
  const pdf = await page.pdf({ format: "A4" });
  expect(pdf.byteLength).toBeGreaterThan(10_000);
});

import { expect, test, type Page } from "@playwright/test";
import { accountOf, signIn } from "./people";

async function workedCount(page: Page): Promise<number> {
  const response = await page.request.get("/api/v1/hit-rates");
  expect(response.status()).toBe(200);
  const { worked }: { worked: { n: number } } = await response.json();
  return worked.n;
}

test("a questionnaire becomes advice, a run report moves the hit rate", async ({ page }) => {
  await signIn(page, accountOf("analyst"));
  const before = await workedCount(page);

  await page.goto("/cases/new");
  await page.getByLabel("Title").fill("Journey case");
  await expect(page.getByText("395 932", { exact: false }).or(page.getByText("395\u202f932"))).toBeVisible();
  await page.getByLabel("Size", { exact: true }).fill("100000");
  await expect(page.getByRole("heading", { name: "Provisional first choice" })).toBeVisible();
  await page.getByRole("button", { name: "Save the case and get advice" }).click();

  await expect(page).toHaveURL(/\/cases\/\d+$/);
  await expect(page.getByRole("heading", { name: "Journey case" })).toBeVisible();
  await expect(page.getByRole("heading", { name: "Ranked strategies" })).toBeVisible();
  const first = page.locator("section[aria-labelledby=ranking] [data-strategy]").first();
  await expect(first.getByText("1.0x")).toBeVisible();
  await first.getByRole("tab", { name: "Options file" }).click();
  await expect(first.locator("pre").first()).toContainText("-ksp_");

  await page.getByRole("button", { name: "Report a run" }).first().click();
  const dialog = page.getByRole("dialog");
  const strategy = await first.getAttribute("data-strategy");
  await expect(dialog.getByLabel("Strategy", { exact: true })).toHaveValue(strategy ?? "none");
  await dialog.getByLabel("Iterations").fill("abc");
  await dialog.getByLabel("Set-up time").fill("1.4");
  await expect(dialog.getByText(/number/i).first()).toBeVisible();
  await dialog.getByLabel("Iterations").fill("31");
  await dialog.getByLabel("Time of one solve").fill("9.8");
  await dialog.getByLabel("Peak memory").fill("6.2");
  await dialog.getByLabel("True relative residual").fill("4.1e-7");
  await dialog.getByRole("button", { name: "Record the run" }).click();
  await expect(dialog).toBeHidden();
  await expect(page.locator("[data-run]")).toHaveCount(1);
  await expect(page.locator("[data-run]").getByText("worked", { exact: true })).toBeVisible();

  expect(await workedCount(page)).toBe(before + 1);
  await page.goto("/hit-rates");
  await page.getByRole("link", { name: /\d+ worked/ }).first().click();
  await expect(page).toHaveURL(/\/cases\?.*result=worked/);
  await expect(page.getByRole("link", { name: "Journey case" }).first()).toBeVisible();
});

test("a run is corrected with its former values kept, and withdrawn but not deleted", async ({ page }) => {
  await signIn(page, accountOf("analyst"));
  await page.goto("/cases?q=Journey");
  await page.getByRole("link", { name: "Journey case" }).first().click();
  await page.locator("[data-run] summary").click();
  const opened = page.locator("[data-run]");
  await opened.getByRole("button", { name: "Correct" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Time of one solve").fill("8.9");
  await dialog.getByLabel("Why it is corrected").fill("Read from the wrong line.");
  await dialog.getByRole("button", { name: "Save the correction" }).click();
  await expect(dialog).toBeHidden();
  await opened.getByRole("button", { name: "Former values" }).click();
  await expect(page.getByRole("dialog").getByText("9.8")).toBeVisible();
  await expect(page.getByRole("dialog").getByText("Read from the wrong line.")).toBeVisible();
  await page.getByRole("button", { name: "Close", exact: true }).click();

  await opened.getByRole("button", { name: "Withdraw" }).click();
  await page.getByRole("dialog").getByLabel("Why").fill("Wrong machine.");
  await page.getByRole("button", { name: "Withdraw the run" }).click();
  await expect(opened.getByText("withdrawn", { exact: true })).toBeVisible();
});

test("a draft outlives a reload, a copy starts from its case, and impossible answers are refused in words", async ({ page }) => {
  await signIn(page, accountOf("analyst"));
  await page.goto("/cases/new");
  await page.getByLabel("Title").fill("Kept over a reload");
  await page.getByLabel("Relative tolerance").fill("0.5");
  await expect(page.getByText("The tolerance is at most 1e-2.")).toBeVisible();
  await page.reload();
  await expect(page.getByLabel("Title")).toHaveValue("Kept over a reload");
  await expect(page.getByLabel("Relative tolerance")).toHaveValue("0.5");
  await page.getByRole("button", { name: "Save the case and get advice" }).click();
  await expect(page.getByLabel("Relative tolerance")).toBeFocused();
  await page.getByRole("button", { name: "Start over" }).click();
  await expect(page.getByLabel("Title")).toHaveValue("");

  await page.goto("/cases?q=Journey");
  await page.getByRole("link", { name: "Journey case" }).first().click();
  await page.getByRole("link", { name: "Copy as a new case" }).click();
  await expect(page.getByLabel("Title")).toHaveValue("Journey case");
  await expect(page.getByLabel("Size", { exact: true })).toHaveValue("100000");
});

test("the questionnaire can be filled in by keyboard alone", async ({ page }) => {
  await signIn(page, accountOf("analyst"));
  await page.goto("/cases/new");
  const title = page.getByLabel("Title");
  await expect(title).toBeVisible();
  // Tab from the top of the page until the first field is reached: nothing may trap the focus.
  for (let presses = 0; presses < 40 && !(await title.evaluate((element) => element === document.activeElement)); presses++) await page.keyboard.press("Tab");
  await expect(title).toBeFocused();
  await page.keyboard.type("By keyboard");
  await page.keyboard.press("Tab");
  await page.keyboard.press("ArrowDown");
  await expect(page.getByLabel("Coefficient pattern")).toHaveValue("blocks");
  const save = page.getByRole("button", { name: "Save the case and get advice" });
  for (let presses = 0; presses < 60 && !(await save.evaluate((element) => element === document.activeElement)); presses++) await page.keyboard.press("Tab");
  await expect(save).toBeFocused();
  await page.keyboard.press("Enter");
  await expect(page).toHaveURL(/\/cases\/\d+$/);
  await expect(page.getByRole("heading", { name: "By keyboard" })).toBeVisible();
});

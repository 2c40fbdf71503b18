import { expect, test } from "@playwright/test";
import { accountOf, signIn, signOut } from "./people";

test("somebody registers, invites a colleague, who accepts and sees the team", async ({ page }) => {
  const stamp = Date.now().toString(36);
  const colleague = `colleague-${stamp}@journey.example`;
  await page.goto("/register");
  await page.getByLabel("Your name").fill("Oda Fenwright");
  await page.getByLabel("E-mail").fill(`founder-${stamp}@journey.example`);
  await page.getByLabel("Password", { exact: true }).fill(`long-${stamp}-password`);
  await page.getByLabel("Team").fill(`Journey team ${stamp}`);
  await page.getByRole("button", { name: "Register" }).click();
  await expect(page).toHaveURL(/\/cases/);
  await expect(page.getByRole("heading", { name: "No case yet" })).toBeVisible();

  await page.goto("/team");
  await page.getByLabel("E-mail of the person to invite").fill(colleague);
  await page.getByLabel("Role", { exact: true }).last().selectOption("analyst");
  await page.getByRole("button", { name: "Invite" }).click();
  await expect(page.getByText(colleague)).toBeVisible();

  await signOut(page);
  await expect
    .poll(async () => {
      await page.goto("/outbox");
      return page.getByRole("article").filter({ hasText: colleague }).count();
    }, { timeout: 30_000 })
    .toBeGreaterThan(0);
  await page.getByRole("article").filter({ hasText: colleague }).getByRole("link").first().click();
  await page.getByLabel("Your name").fill("Bram Oldacre");
  await page.getByLabel("Password", { exact: true }).fill(`other-${stamp}-password`);
  await page.getByRole("button", { name: "Register and join" }).click();
  await expect(page).toHaveURL(/\/cases/);
  await page.goto("/team");
  await expect(page.getByRole("cell", { name: /Oda Fenwright/ })).toBeVisible();
});

test("an observer reads everything and can change nothing, on screen and over the API", async ({ page, baseURL }) => {
  await signIn(page, accountOf("observer"));
  await expect(page.getByRole("link", { name: "New case" })).toHaveCount(0);
  await page.locator("tbody a").first().click();
  await expect(page.getByRole("heading", { name: "Ranked strategies" })).toBeVisible();
  for (const name of ["Report a run", "Advise again"]) await expect(page.getByRole("button", { name })).toHaveCount(0);
  await page.goto("/cases/new");
  await expect(page.getByRole("button", { name: /Save the case/ })).toHaveCount(0);

  const { items }: { items: { id: string; number: number }[] } = await (await page.request.get("/api/v1/cases")).json();
  const [one] = items;
  expect(one).toBeDefined();
  const headers = { origin: new URL(baseURL ?? "").origin };
  const report = await page.request.post(`/api/v1/cases/${one?.number}/runs`, { headers, data: { strategy: "direct-ldlt", outcome: "converged" } });
  expect(report.status()).toBe(403);
  expect((await page.request.post(`/api/v1/cases/${one?.number}/advice`, { headers })).status()).toBe(403);
  expect((await page.request.post("/api/v1/machines", { headers, data: {} })).status()).toBe(403);
});

test("another team's case is not found, by number or by id", async ({ browser }) => {
  const basin = await browser.newContext();
  const basinPage = await basin.newPage();
  await signIn(basinPage, accountOf("owner"));
  const { items }: { items: { id: string }[] } = await (await basinPage.request.get("/api/v1/cases?sort=-number")).json();
  const id = items[0]?.id ?? "";
  await basin.close();

  const harbour = await browser.newContext();
  const page = await harbour.newPage();
  await signIn(page, accountOf("owner", 1));
  expect((await page.request.get(`/api/v1/cases/${id}`)).status()).toBe(404);
  const response = await page.goto(`/cases/${id}`);
  expect(response?.status()).toBe(404);
  await harbour.close();
});

test("a forgotten password is set anew by mail", async ({ page }) => {
  const account = accountOf("curator");
  const letters = () => page.getByRole("article").filter({ hasText: account.email });
  await page.goto("/outbox");
  const before = await letters().count();
  await page.goto("/forgot-password");
  await page.getByLabel("E-mail").fill(account.email);
  await page.getByRole("button", { name: "Send the link" }).click();
  await expect
    .poll(async () => {
      await page.goto("/outbox");
      return letters().count();
    }, { timeout: 30_000 })
    .toBeGreaterThan(before);
  await letters().first().getByRole("link").first().click();
  await page.getByLabel("New password").fill(account.password);
  await page.getByRole("button", { name: "Set the password" }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await signIn(page, account);
});

import { readFileSync } from "node:fs";
import { expect, type Page } from "@playwright/test";
import { z } from "zod";

const accountSchema = z.object({ email: z.string(), password: z.string(), role: z.string(), team: z.string() });

/** The demonstration's accounts, from the file that the start command writes. */
export function demonstrationAccounts() {
  const file = process.env.DEMO_ACCOUNTS_FILE;
  if (!file) throw new Error("DEMO_ACCOUNTS_FILE is not set: run npm test -- --only browser.");
  return z.array(accountSchema).parse(JSON.parse(readFileSync(file, "utf8")));
}

export function accountOf(role: string, teamIndex = 0) {
  const accounts = demonstrationAccounts();
  const teams = [...new Set(accounts.map((account) => account.team))];
  const found = accounts.find((account) => account.role === role && account.team === teams[teamIndex]);
  if (!found) throw new Error(`The demonstration has no ${role} in team ${teamIndex + 1}.`);
  return found;
}

export async function signIn(page: Page, account: { email: string; password: string }): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("E-mail").fill(account.email);
  await page.getByLabel("Password", { exact: true }).fill(account.password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page).toHaveURL(/\/cases/);
}

export async function signOut(page: Page): Promise<void> {
  await page.context().clearCookies();
}

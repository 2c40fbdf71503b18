import { defineConfig } from "@playwright/test";

const baseURL = process.env.SADDLEMARK_BASE_URL;
if (!baseURL) throw new Error("SADDLEMARK_BASE_URL is not set: run npm test -- --only browser, or start the application and set it to its address.");

export default defineConfig({
  testDir: "tests/browser",
  outputDir: "test-results",
  // One application and one database for all: the journeys take turns.
  workers: 1,
  fullyParallel: false,
  retries: 0,
  forbidOnly: true,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: [["line"]],
  use: {
    baseURL,
    locale: "en-GB",
    timezoneId: "UTC",
    trace: "off",
    screenshot: "only-on-failure",
    launchOptions: {
      executablePath: "/usr/bin/chromium",
      args: [
        "--no-sandbox",
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
      ],
    },
  },
});

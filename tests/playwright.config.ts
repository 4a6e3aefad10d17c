import { fileURLToPath } from "node:url";
import { defineConfig } from "@playwright/test";

const under = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** Journeys in a real Chromium (Debian's package or the one named by CHROMIUM_PATH) against the built window. */
export default defineConfig({
  testDir: under("."),
  testMatch: ["journeys/**/*.spec.ts", "desktop/**/*.spec.ts"],
  outputDir: under("../test-results/playwright"),
  // Generous, because a busy machine is slow and not wrong.
  timeout: 120_000,
  expect: { timeout: 20_000 },
  workers: 1,
  // What passes at the second try only is named at the end of `npm test`.
  retries: 1,
  reporter: [["list"], ["json", { outputFile: under("../test-results/playwright.json") }]],
  use: {
    viewport: { width: 1280, height: 800 },
    video: "off",
    trace: "off",
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
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

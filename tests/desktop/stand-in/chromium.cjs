const { spawn } = require("node:child_process");
const { mkdirSync } = require("node:fs");
const { chromium } = require("playwright-core");

const SWITCHES = [
  "--headless=new",
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
  "--remote-debugging-port=0",
  "--window-size=1280,800",
];

/**
 * Starts a Chromium that dies with this process, however this process ends.
 * @returns the address of its debugger, the browser as Playwright sees it, and a way to end it.
 */
async function startChromium(profile) {
  mkdirSync(profile, { recursive: true });
  const binary = process.env.CHROMIUM_PATH || "/usr/bin/chromium";
  const child = spawn("setpriv", ["--pdeathsig", "KILL", binary, ...SWITCHES, `--user-data-dir=${profile}`, "about:blank"], {
    stdio: ["ignore", "ignore", "pipe"],
  });
  const address = await new Promise((resolve, reject) => {
    let said = "";
    child.stderr.on("data", (piece) => {
      said += piece;
      const match = /DevTools listening on (ws:\S+)/.exec(said);
      if (match !== null) resolve(match[1]);
    });
    child.on("error", reject);
    child.on("exit", () => reject(new Error(`Chromium ended: ${said.slice(-500)}`)));
  });
  const browser = await chromium.connectOverCDP(address);
  const [context] = browser.contexts();
  for (const page of context.pages()) await page.close();
  return { address, context, end: () => child.kill("SIGKILL") };
}

module.exports = { startChromium };

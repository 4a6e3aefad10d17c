import { readFile, stat } from "node:fs/promises";
import { parseArgs } from "node:util";
import { createPlanner } from "../renderer/engine/plan";
import { LARGEST_FILE_BYTES, parseSetupText } from "../shared-types/parse-setup";
import { type Plan, type PlanOutcome, QUALITIES, type Quality } from "../shared-types/plan";
import type { Setup } from "../shared-types/setup";
import { setupId } from "../shared-types/setup-id";
import { checkReport, probesReport, solveReport } from "./headless-reports";
import { readSheetOptions, writeSheets } from "./headless-sheets";

/**
 * The headless command: JSON on standard output, messages on standard error.
 * Exit codes: 0 done · 1 a fault of ours · 2 the file or the options are wrong · 3 a valid setup that cannot be planned.
 */

const EXIT_WRONG = 2;
const EXIT_UNPLANNABLE = 3;

/** A message for the user with the exit code that goes with it. */
class Refusal extends Error {
  constructor(
    readonly exitCode: number,
    message: string,
  ) {
    super(message);
  }
}

const wrong = (message: string): Refusal => new Refusal(EXIT_WRONG, message);

const USAGE = `usage: headless solve FILE [--at "x,y x,y …"] [--quality live|print|reference]
       headless probes FILE
       headless check FILE
       headless sheets FILE --out PACK.pdf [--paper a4|a3|a2|letter|tabloid] [--only NAME,…] [--printer-scale X,Y] [--date YYYY-MM-DD]`;

const OPTIONS = {
  at: { type: "string" },
  quality: { type: "string" },
  out: { type: "string" },
  paper: { type: "string" },
  only: { type: "string" },
  "printer-scale": { type: "string" },
  date: { type: "string" },
} as const;

type Options = { readonly [Name in keyof typeof OPTIONS]?: string };

const OPTIONS_OF: Readonly<Record<string, readonly (keyof typeof OPTIONS)[]>> = {
  solve: ["at", "quality"],
  probes: [],
  check: [],
  sheets: ["out", "paper", "only", "printer-scale", "date"],
};

async function readSetup(path: string): Promise<Setup> {
  let text: string;
  try {
    const { size } = await stat(path);
    if (size > LARGEST_FILE_BYTES) throw wrong(`${path} holds ${size} bytes, allowed: at most ${LARGEST_FILE_BYTES} (5 MB)`);
    text = await readFile(path, "utf8");
  } catch (error) {
    if (error instanceof Refusal) throw error;
    throw wrong(`${path} cannot be read: ${error instanceof Error ? error.message : String(error)}`);
  }
  const parsed = parseSetupText(text);
  if (parsed.ok) return parsed.value;
  throw wrong(parsed.problems.map(({ message }) => `${path}: ${message}`).join("\n"));
}

function placesOf(text: string | undefined): [number, number][] {
  if (text === undefined || text.trim() === "") return [];
  return text
    .trim()
    .split(/\s+/)
    .map((pair) => {
      const numbers = pair.split(",").map((part) => (part.trim() === "" ? Number.NaN : Number(part)));
      if (numbers.length !== 2 || !numbers.every(Number.isFinite))
        throw wrong(`--at holds "${pair}", allowed: pairs of numbers "x,y" in mm, divided by spaces`);
      return [numbers[0], numbers[1]];
    });
}

function qualityOf(text: string | undefined): Quality {
  const quality = QUALITIES.find((one) => one === (text ?? "print"));
  if (quality === undefined) throw wrong(`--quality is "${text}", allowed: ${QUALITIES.join(", ")}`);
  return quality;
}

const clock = { now: () => performance.now() };

function planned(outcome: PlanOutcome): Plan {
  if (outcome.ok) return outcome.plan;
  throw new Refusal(EXIT_UNPLANNABLE, outcome.refusal.message);
}

const print = (report: object): void => {
  process.stdout.write(`${JSON.stringify(report, null, 2)}\n`);
};

async function runVerb(verb: string, setup: Setup, options: Options): Promise<void> {
  const planner = createPlanner();
  switch (verb) {
    case "solve": {
      const places = placesOf(options.at);
      const plan = planned(await planner.plan(setup, qualityOf(options.quality), clock));
      print(solveReport(plan, planner.sample(setup, places) ?? []));
      return;
    }
    case "probes":
      print(probesReport(planned(await planner.plan(setup, "print", clock))));
      return;
    case "check": {
      const outcome = await planner.plan(setup, "print", clock);
      const report = checkReport(setupId(setup), outcome.ok ? outcome.plan.findings : outcome.refusal.findings);
      print(report);
      const { stop, caution, note } = report.counts;
      process.stderr.write(`${stop} stop, ${caution} caution, ${note} note\n`);
      return;
    }
    default: {
      const order = await readSheetOptions(options, wrong, new Date());
      const plan = planned(await planner.plan(setup, "print", clock));
      const pages = await writeSheets(setup, plan, order);
      process.stderr.write(`${order.out}: ${pages} pages\n`);
      print({ setupId: plan.setupId, out: order.out, pages, paper: order.paper, sheets: order.sheets, printerScale: order.printerScale });
    }
  }
}

async function main(args: readonly string[]): Promise<void> {
  let parsed: { readonly values: Options; readonly positionals: readonly string[] };
  try {
    parsed = parseArgs({ args: [...args], options: OPTIONS, allowPositionals: true, strict: true });
  } catch (error) {
    throw wrong(`${error instanceof Error ? error.message : String(error)}\n${USAGE}`);
  }
  const [verb, file, ...more] = parsed.positionals;
  const allowed = verb === undefined ? undefined : OPTIONS_OF[verb];
  if (verb === undefined || allowed === undefined) {
    throw wrong(`${verb === undefined ? "no verb is given" : `"${verb}" is no verb`}, allowed: solve, probes, check, sheets\n${USAGE}`);
  }
  if (file === undefined) throw wrong(`${verb} needs a setup file\n${USAGE}`);
  if (more.length > 0) throw wrong(`"${more[0]}" is one argument too many\n${USAGE}`);
  for (const name of Object.keys(parsed.values)) {
    if (!allowed.some((one) => one === name))
      throw wrong(`--${name} does not go with ${verb}, allowed: ${allowed.map((one) => `--${one}`).join(", ") || "no option"}`);
  }
  await runVerb(verb, await readSetup(file), parsed.values);
}

main(process.argv.slice(2)).catch((error: unknown) => {
  if (error instanceof Refusal) {
    process.stderr.write(`${error.message}\n`);
    process.exitCode = error.exitCode;
  } else {
    process.stderr.write(`a fault of ours: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
    process.exitCode = 1;
  }
});

import { createPlanner } from "../renderer/engine/plan";
import type { Plan, PlanOutcome } from "../shared-types/plan";
import type { Setup } from "../shared-types/setup";
import { setupId } from "../shared-types/setup-id";
import { placesOf, qualityOf, type Request, requestOf, USAGE } from "./headless/arguments";
import { jsonText } from "./headless/json-text";
import { EXIT, Refusal } from "./headless/refusal";
import { checkReport, probesReport, solveReport } from "./headless/reports";
import { readSetup } from "./headless/setup-on-disk";
import { sheetOrder, writeSheets } from "./headless/sheets";

/**
 * The headless command: the engine of the window without a window. JSON on standard output and nothing else there,
 * messages on standard error. The exit codes stand in headless/refusal.ts, the verbs and their options in headless/arguments.ts.
 */

const clock = { now: () => performance.now() };

function planned(outcome: PlanOutcome): Plan {
  if (outcome.ok) return outcome.plan;
  throw new Refusal(EXIT.cannotPlan, outcome.refusal.message);
}

const printPlan = async (setup: Setup): Promise<PlanOutcome> => createPlanner().plan(setup, "print", clock);

/** The print plan with the whole tolerance of its points. */
async function bandedPlan(setup: Setup): Promise<Plan> {
  const planner = createPlanner();
  const plan = planned(await planner.plan(setup, "print", clock));
  return { ...plan, probing: await planner.bands(setup, plan) };
}

const print = (report: object): void => {
  process.stdout.write(`${jsonText(report)}\n`);
};

const say = (text: string): void => {
  process.stderr.write(`${text}\n`);
};

async function solve({ file, options }: Request): Promise<void> {
  const places = placesOf(options.get("at"));
  const quality = qualityOf(options.get("quality"));
  const setup = await readSetup(file);
  const planner = createPlanner();
  const plan = planned(await planner.plan(setup, quality, clock));
  print(solveReport(plan, planner.sample(setup, places) ?? []));
}

async function probes({ file }: Request): Promise<void> {
  print(probesReport(await bandedPlan(await readSetup(file))));
}

/** A setup that cannot be planned still has its findings: they say why. */
async function check({ file }: Request): Promise<void> {
  const setup = await readSetup(file);
  const outcome = await printPlan(setup);
  const report = checkReport(setupId(setup), outcome.ok ? outcome.plan.findings : outcome.refusal.findings);
  print(report);
  const { stop, caution, note } = report.counts;
  say(`${stop} stop, ${caution} caution, ${note} note`);
}

async function sheets({ file, options }: Request): Promise<void> {
  const order = await sheetOrder(options, new Date());
  const setup = await readSetup(file);
  const plan = await bandedPlan(setup);
  const pages = await writeSheets(setup, plan, order);
  const { out, paper, sheets: names, printerScale, date } = order;
  print({ setupId: plan.setupId, out, pages, paper, sheets: names, printerScale, date });
}

const VERB: Readonly<Record<Request["verb"], (request: Request) => Promise<void>>> = { solve, probes, check, sheets };

async function run(args: readonly string[]): Promise<void> {
  if (args.includes("--help")) {
    say(USAGE);
    return;
  }
  const request = requestOf(args);
  await VERB[request.verb](request);
}

// A reader that closes early, such as `head`, is no fault.
process.stdout.on("error", (error: NodeJS.ErrnoException) => process.exit(error.code === "EPIPE" ? EXIT.done : EXIT.fault));

run(process.argv.slice(2)).catch((error: unknown) => {
  if (error instanceof Refusal) {
    say(error.message);
    process.exitCode = error.exitCode;
  } else {
    say(`a fault of the program: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
    process.exitCode = EXIT.fault;
  }
});

import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { findingsOf } from "../../../../renderer/engine/findings/all-findings";
import { parseSetup } from "../../../../shared-types/parse-setup";
import type { Finding, RemedyEdit } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";
import { channel, channelFacts, fullWidthBar } from "../bench/trays";

type Change = Parameters<typeof channel>[0];

function findingsFor(setup: Setup): readonly Finding[] {
  const facts = channelFacts(setup);
  return findingsOf(setup, benchOf(setup, facts), facts, { spanV: [0, setup.supply.volts], levels: [], checks: [] });
}

/** The setup with one key changed, read again as from a file. */
function remedied(setup: Setup, edit: RemedyEdit): Setup {
  const copy: object = structuredClone(setup);
  const keys = edit.path.replace(/\[(\d+)\]/g, ".$1").split(".");
  const last = keys.pop() ?? "";
  const holder: unknown = keys.reduce(
    (at: unknown, key) => (typeof at === "object" && at !== null ? Reflect.get(at, key) : undefined),
    copy,
  );
  if (typeof holder !== "object" || holder === null || !Reflect.has(holder, last)) throw new Error(`no such key: ${edit.path}`);
  Reflect.set(holder, last, edit.value);
  const parsed = parseSetup(copy);
  if (!parsed.ok) throw new Error(parsed.problems.map((problem) => problem.message).join("; "));
  return parsed.value;
}

const bars = [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 215)];
const FAULTS: readonly (readonly [string, Change])[] = [
  ["volts-above-wet-hands", { supply: { volts: 20 } }],
  ["volts-above-dry", { supply: { volts: 60 } }],
  ["source-not-isolated", { supply: { source: "mains" } }],
  ["current-above-limit", { supply: { currentLimitA: 0.003 } }],
  ["water-warms", { water: { conductivityUsPerCm: 9000 }, supply: { volts: 12 } }],
  ["dc-polarises", { supply: { waveform: "dc" } }],
  ["anode-dissolves", { supply: { waveform: "dc" } }],
  ["chloride-dc", { supply: { waveform: "dc" }, water: { salt: "sodium-chloride" } }],
  ["electrode-too-short", { parts: [{ ...bars[0], heightMm: 9 }, bars[1]] }],
  ["freeboard", { tray: { wallHeightMm: 20 } }],
  ["water-spills", { tray: { wallHeightMm: 22 }, water: { depthMm: 23 } }],
  ["too-shallow-for-tilt", { water: { depthMm: 4 } }],
  ["no-potential-difference", { parts: [bars[0], { ...bars[1], tap: 0 }] }],
  ["lead-unused", { parts: [{ ...bars[0], tap: 0.25 }, bars[1]] }],
  ["tray-conducts", { tray: { baseMaterial: "steel" } }],
  ["interface-loss", { supply: { frequencyHz: 3 }, meter: { acLowHz: 1 } }],
  ["frequency-outside-meter", { supply: { frequencyHz: 1000 } }],
  ["frequency-not-advised", { supply: { frequencyHz: 5000 }, meter: { acHighHz: 20_000 } }],
  ["gradient-unreadable", { supply: { volts: 0.1 } }],
];

describe("a remedy with a button", () => {
  it.each(FAULTS)("clears “%s” when it is applied", (code, change) => {
    const setup = channel(change);
    const found = findingsFor(setup).find((finding) => finding.code === code);
    expect(found?.edit ?? null).not.toBeNull();
    if (found === undefined || found.edit === null) return;
    expect(findingsFor(remedied(setup, found.edit)).map((finding) => finding.code)).not.toContain(code);
  });
});

import type { BenchNumbers } from "../../../shared-types/bench";
import type { Finding, ProbePlan, Severity } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { FieldFacts } from "../bench/field-facts";
import { currentPaths } from "./current-paths";
import { chlorideWithDirectCurrent, directCurrentPolarises } from "./direct-current";
import { electrodeMetal, solubleAnode } from "./electrode-metal";
import { chlorineInRoom, gasVolume } from "./gas-volume";
import { meterFrequency, meterLoading, readableGradient } from "./meter-fit";
import { partOutside } from "./part-outside";
import { partsAboveWater } from "./parts-above-water";
import { partsMeet } from "./parts-meet";
import { probeReach } from "./probe-reach";
import type { PlanRule, SetupRule } from "./rule";
import { sourceIsolation } from "./source-isolation";
import { supplyCurrent } from "./supply-current";
import { alternatingGas, directDrop, interfaceShare } from "./surface-losses";
import { tapsInUse } from "./taps-in-use";
import { templateTiles } from "./template-tiles";
import { touchVoltage } from "./touch-voltage";
import { trayMaterial } from "./tray-material";
import { warming } from "./warming";
import { bedRunsDry, depthStep, freeboard, tooShallowForTilt } from "./water-in-tray";
import { saltBeyondData, waterKindFits, waterTemperature } from "./water-kind";

const SETUP_RULES: readonly SetupRule[] = [
  partsMeet,
  partOutside,
  tapsInUse,
  trayMaterial,
  partsAboveWater,
  freeboard,
  tooShallowForTilt,
  bedRunsDry,
  depthStep,
  touchVoltage,
  sourceIsolation,
  chlorideWithDirectCurrent,
  directCurrentPolarises,
  electrodeMetal,
  meterFrequency,
  waterKindFits,
  waterTemperature,
  saltBeyondData,
  templateTiles,
];
const PLAN_RULES: readonly PlanRule[] = [
  currentPaths,
  supplyCurrent,
  warming,
  gasVolume,
  chlorineInRoom,
  solubleAnode,
  interfaceShare,
  directDrop,
  alternatingGas,
  meterLoading,
  readableGradient,
  probeReach,
];

const ORDER: Record<Severity, number> = { stop: 0, caution: 1, note: 2 };

const gravestFirst = (findings: readonly Finding[]): readonly Finding[] =>
  [...findings].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);

/** @returns what the rules that need no field find, gravest first. Never throws. */
export function geometryFindings(setup: Setup): readonly Finding[] {
  return gravestFirst(SETUP_RULES.flatMap((rule) => rule(setup)));
}

/**
 * Everything that the rules find: those that need no field, and those that read it.
 * @returns one list for screen, `check` and paper, gravest first.
 */
export function findingsOf(setup: Setup, bench: BenchNumbers, field: FieldFacts, probing: ProbePlan): readonly Finding[] {
  const found = { setup, bench, field, probing };
  return gravestFirst([...SETUP_RULES.flatMap((rule) => rule(setup)), ...PLAN_RULES.flatMap((rule) => rule(found))]);
}

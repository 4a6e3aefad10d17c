import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { isSaltSolution } from "../engine/bench/water-conductivity";
import {
  CHLORINE_CEILING,
  dryHandsLimit,
  FREEBOARD,
  HYDROGEN_CAUTION,
  HYDROGEN_FLAMMABLE,
  type Limit,
  POWER,
  SAFETY_SOURCE,
  sourceOf,
  WARMING,
  wetHandsLimit,
} from "../engine/findings/limits";
import { current, shown } from "../engine/findings/wording";

/** The numbers of the low-voltage checklist, each beside its limit, whether it is kept, and the limit's source. */

export interface NumberRow {
  readonly quantity: string;
  readonly here: string;
  readonly limit: string;
  readonly source: string;
  /** Whether the limit is kept; absent where there is none. */
  readonly kept?: boolean;
}

const atMost = ({ value, unit }: Limit, more = ""): string => `at most ${value} ${unit}${more}`;

/** Volts that hands may meet: of the supply and between metals, each against the limits for wet and for dry hands. */
function voltRows({ supply, water }: Setup, [low, high]: Plan["spanV"]): NumberRow[] {
  const kind = supply.waveform === "ac" ? "V AC" : "V DC";
  const wet = wetHandsLimit(supply.waveform, isSaltSolution(water.salt));
  const dry = dryHandsLimit(supply.waveform);
  const standing = Math.max(supply.volts, supply.openCircuitVolts ?? 0);
  const open = supply.openCircuitVolts === undefined ? "; with nothing connected: to be measured below" : " with nothing connected";
  const between = ((high - low) * standing) / supply.volts;
  return [
    {
      quantity: "Highest voltage anywhere",
      here: `${shown(standing, 4)} ${kind}${open}`,
      limit: atMost(wet, ", wet hands"),
      source: sourceOf(wet),
      kept: standing <= wet.value,
    },
    { quantity: "", here: "", limit: atMost(dry, ", dry hands"), source: sourceOf(dry), kept: standing <= dry.value },
    {
      quantity: "Between any two metals that hands can touch",
      here: `${shown(between, 4)} ${kind}`,
      limit: atMost(wet, ", wet hands"),
      source: sourceOf(wet),
      kept: between <= wet.value,
    },
  ];
}

function gasRows({ session }: Setup, gas: Plan["bench"]["gas"]): NumberRow[] {
  if (gas === null)
    return [{ quantity: "Gas", here: "AC: little or none", limit: "no odour, no steady bubbles", source: "common practice, no source" }];
  return [
    {
      quantity: "Hydrogen, at most",
      here: `${shown(gas.hydrogenMl)} mL a tray: ${shown(gas.hydrogenVolPercent)} vol % in ${shown(gas.hoodLitres)} L of still air`,
      limit: `${atMost(HYDROGEN_CAUTION)}; flammable from ${HYDROGEN_FLAMMABLE.value} ${HYDROGEN_FLAMMABLE.unit}`,
      source: `${sourceOf(HYDROGEN_CAUTION)}; ${sourceOf(HYDROGEN_FLAMMABLE)}`,
      kept: gas.hydrogenVolPercent <= HYDROGEN_CAUTION.value,
    },
    {
      quantity: "Chlorine, at most",
      here:
        gas.chlorineMl > 0
          ? `${shown(gas.chlorineMl)} mL a tray: ${shown(gas.chlorineRoomPpm)} ppm in ${shown(session.roomCubicMetres)} m³`
          : "none: no chloride in the water",
      limit: atMost(CHLORINE_CEILING),
      source: sourceOf(CHLORINE_CEILING),
      kept: gas.chlorineRoomPpm <= CHLORINE_CEILING.value,
    },
  ];
}

/** @returns the numbers that matter, in the order of the checklist. */
export function numberRows(setup: Setup, plan: Plan): NumberRow[] {
  const { supply, session, water } = setup;
  const { circuit, heat, gas, geometry } = plan.bench;
  const salt = plan.bench.water.saltToTarget;
  const added =
    salt !== null
      ? `${shown(salt.perTrayG)} g of sodium chloride a tray, ${shown(salt.allTraysG)} g in all`
      : water.salt === "none"
        ? "none"
        : `${water.salt}, already in the water`;
  return [
    ...voltRows(setup, plan.spanV),
    {
      quantity: "Waveform",
      here: supply.waveform === "ac" ? `AC, ${shown(supply.frequencyHz, 4)} Hz` : "DC",
      limit: "AC preferred",
      source: "DC polarises the electrodes (common practice, no source)",
    },
    {
      quantity: "Source of the supply",
      here: supply.source,
      limit: "safety isolating transformer or battery",
      source: sourceOf(SAFETY_SOURCE),
      kept: !plan.findings.some(({ code }) => code === "source-not-isolated"),
    },
    {
      quantity: "Current of one tray",
      here: current(circuit.currentA.value),
      limit: `${current(circuit.currentLimitA)} limit set at the supply`,
      source: "the supply's own current limit",
      kept: circuit.currentA.value <= circuit.currentLimitA,
    },
    {
      quantity: "Power of one tray",
      here: `${shown(plan.powerW)} W`,
      limit: atMost(POWER),
      source: sourceOf(POWER),
      kept: plan.powerW <= POWER.value,
    },
    {
      quantity: "Energy in the session",
      here: `${shown(plan.powerW * session.minutes * 60)} J in ${shown(session.minutes)} min, each tray`,
      limit: "for the record",
      source: "power × time",
    },
    {
      quantity: "Warming, at most",
      here: `${shown(heat.riseOverSessionK)} K over the session`,
      limit: atMost(WARMING),
      source: sourceOf(WARMING),
      kept: heat.riseOverSessionK <= WARMING.value,
    },
    {
      quantity: "Wall above the water",
      here: `${shown(geometry.freeboardMm)} mm`.replace("-", "−"),
      limit: `at least ${FREEBOARD.value} ${FREEBOARD.unit}`,
      source: sourceOf(FREEBOARD),
      kept: geometry.freeboardMm >= FREEBOARD.value,
    },
    ...gasRows(setup, gas),
    {
      quantity: "Chemical added",
      here: added,
      ...(salt === null
        ? { limit: "for the record", source: "the setup" }
        : { limit: "never with DC", source: sourceOf(CHLORINE_CEILING), kept: supply.waveform === "ac" }),
    },
    {
      quantity: "Trays at the same time",
      here: `${session.trays}`,
      limit: "each on its own isolated output",
      source: "common practice, no source",
    },
  ];
}

/** @returns what stands in the column "kept". */
export const keptWords = ({ kept }: NumberRow): string => (kept === undefined ? "–" : kept ? "yes" : "NO");

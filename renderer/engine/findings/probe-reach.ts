import type { Severity } from "../../../shared-types/plan";
import type { PlanRule } from "./rule";
import { finding, listed, shown } from "./wording";

/** Levels on which the probe finds fewer places than asked for, or none. */
export const probeReach: PlanRule = ({ setup, probing }) => {
  const { pointsPerLevel } = setup.probing;
  const poor = probing.levels.filter((level) => level.points.length < pointsPerLevel);
  if (poor.length === 0) return [];
  const empty = poor.filter((level) => level.points.length === 0);
  const short = empty.length > 0 ? empty : poor;
  const severity: Severity = empty.length > 0 ? "caution" : "note";
  const levels = listed(short.map((level) => `${shown(level.volts)} V`));
  const found = probing.levels.reduce((sum, level) => sum + level.points.length, 0);
  const asked = probing.levels.length * pointsPerLevel;
  return [
    finding({
      code: empty.length > 0 ? "level-unreachable" : "too-few-points",
      severity,
      about: "probing.pointsPerLevel",
      message:
        empty.length > 0
          ? `The probe reaches no place on the line${short.length > 1 ? "s" : ""} of ${levels}.`
          : `On the line${short.length > 1 ? "s" : ""} of ${levels} there is room for fewer than ${pointsPerLevel} points.`,
      measured: `${found} of ${asked} points`,
      limit: { text: `${pointsPerLevel} points on each of ${probing.levels.length} lines`, source: "the probe plan that was asked for" },
      remedy: "Ask for fewer points or lines, smaller clearances, or move the parts apart.",
    }),
  ];
};

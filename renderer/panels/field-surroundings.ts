import { createContext } from "react";
import type { Problem } from "../../shared-types/result";
import type { Document } from "../document/document";
import type { Edit } from "../document/edit";
import { LENGTHS_IN_MM } from "./read-number";

export type LengthUnit = "mm" | "cm" | "in";

/** What every field of the window goes by, without each card handing it on. */
export interface FieldSurroundings {
  /** The unit that the user thinks lengths in; setups stay in mm. */
  readonly lengthUnit: LengthUnit;
  /** Called when a run of steps (a held arrow key) ends. */
  readonly onStepsEnd: () => void;
}

export const FieldContext = createContext<FieldSurroundings>({ lengthUnit: "mm", onStepsEnd: () => {} });

export const mmPer = (unit: LengthUnit): number => LENGTHS_IN_MM[unit];

/**
 * Runs an edit; steps of one kind in a row become one undo step.
 * @returns why it was refused, empty when it went through.
 */
export function tried(document: Document, edit: Edit, stepping = false): readonly Problem[] {
  const result = document.run(stepping ? { ...edit, joins: edit.joins ?? `steps: ${edit.label}` } : edit);
  return result.ok ? [] : result.problems;
}

import { useStore } from "zustand";
import { DEFAULT_TOLERANCES, type Tolerances } from "../../../shared-types/setup";
import { changeTolerances } from "../../document/commands/bench";
import type { Document } from "../../document/document";
import { texts } from "../../texts/texts";
import { tried } from "../field-surroundings";
import { NumberField } from "../number-field";

const words = texts.probe.stated;

const SETTINGS: readonly (readonly [key: keyof Tolerances, unit: string, step: number])[] = [
  ["supplyPercent", "%", 0.1],
  ["partPlacementMm", "mm", 0.1],
  ["partTurnDeg", "°", 0.1],
  ["depthMm", "mm", 0.1],
  ["tiltDeg", "°", 0.05],
  ["conductivityPercent", "%", 1],
  ["temperatureK", "K", 0.5],
];

/** What the tray's builder keeps to: the bands follow from it. */
export function StatedTolerances({ document }: { readonly document: Document }) {
  const stated = useStore(document, (state) => state.setup.tolerances ?? DEFAULT_TOLERANCES);
  return (
    <section className="probe-settings" aria-label={words.title}>
      <h2>{words.title}</h2>
      {SETTINGS.map(([key, unit, step]) => (
        <NumberField
          key={key}
          label={words.keys[key]}
          unit={unit}
          value={stated[key]}
          step={step}
          setting={`tolerances.${key}`}
          onSet={(value, stepping) => tried(document, changeTolerances({ [key]: value }), stepping)}
        />
      ))}
    </section>
  );
}

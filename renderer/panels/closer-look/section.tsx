import { useStore } from "zustand";
import type { FieldReading } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { type CloserLook, lengthMm as lengthOf, type Section } from "../../document/closer-look";
import { fixed, trimmed } from "../../document/number-text";
import { traySizeMm } from "../../engine/geometry/tray-outline";
import { texts } from "../../texts/texts";
import { PlaceField } from "./place-field";
import { SectionChart } from "./section-chart";

const words = texts.closer.section;
const CM_PER_M = 100;
/** The table shows every fifth of the places that the chart is drawn through. */
const EACH = 5;

function Values({ readings, lengthMm }: { readonly readings: readonly FieldReading[]; readonly lengthMm: number }) {
  return (
    <details>
      <summary>{words.values}</summary>
      <table className="section-values">
        <thead>
          <tr>
            <th scope="col">{words.distance}</th>
            <th scope="col">{words.volts}</th>
            <th scope="col">{words.field}</th>
          </tr>
        </thead>
        <tbody>
          {readings.flatMap(({ volts, fieldVPerM, inside, xMm, yMm }, index) =>
            index % EACH === 0
              ? [
                  <tr key={`${xMm} ${yMm}`}>
                    <th scope="row">{trimmed((index / (readings.length - 1)) * lengthMm, 1)}</th>
                    <td>{volts === null || Number.isNaN(volts) ? texts.closer.pins.nothing : fixed(volts, 3)}</td>
                    <td>{volts === null || inside !== null ? texts.closer.pins.nothing : fixed(fieldVPerM / CM_PER_M, 3)}</td>
                  </tr>,
                ]
              : [],
          )}
        </tbody>
      </table>
    </details>
  );
}

/** A section across the tray: its two ends by number or by hand, the potential along it as a chart and as a table. */
export function SectionPart(props: {
  readonly setup: Setup;
  readonly closerLook: CloserLook;
  readonly drawing: boolean;
  readonly onDrawing: () => void;
}) {
  const { setup, closerLook, drawing, onDrawing } = props;
  const section = useStore(closerLook, (state) => state.section);
  const readings = useStore(closerLook, (state) => state.sectionReadings);
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const field = (label: string, end: keyof Section, axis: "x" | "y", now: Section) => (
    <PlaceField
      label={label}
      axis={axis}
      tray={setup.tray}
      valueMm={now[end][axis === "x" ? 0 : 1]}
      onSet={(value) => closerLook.laySection({ ...now, [end]: axis === "x" ? [value, now[end][1]] : [now[end][0], value] })}
    />
  );
  return (
    <section aria-label={words.title}>
      <h3>{words.title}</h3>
      {section === null ? (
        <p className="hint">{words.none}</p>
      ) : (
        <>
          <div className="grid-2">
            {field(words.ax, "from", "x", section)}
            {field(words.ay, "from", "y", section)}
            {field(words.bx, "to", "x", section)}
            {field(words.by, "to", "y", section)}
          </div>
          <SectionChart readings={readings} lengthMm={lengthOf(section)} />
          {readings.length > 0 && <Values readings={readings} lengthMm={lengthOf(section)} />}
        </>
      )}
      <div className="choices">
        <button type="button" aria-pressed={drawing} onClick={onDrawing}>
          {words.draw}
        </button>
        {section === null ? (
          <button type="button" onClick={() => closerLook.laySection({ from: [0, widthMm / 2], to: [lengthMm, widthMm / 2] })}>
            {words.across}
          </button>
        ) : (
          <button type="button" onClick={() => closerLook.laySection(null)}>
            {words.away}
          </button>
        )}
      </div>
    </section>
  );
}

import { useStore } from "zustand";
import type { FieldReading } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { type CloserLook, MOST_PINS, type Pin } from "../../document/closer-look";
import { thingById, thingName } from "../../document/edit";
import { fixed, trimmed } from "../../document/number-text";
import { traySizeMm } from "../../engine/geometry/tray-outline";
import { texts } from "../../texts/texts";
import { boundedText } from "../bounded-text";
import { IconButton } from "../icon-button";
import { PlaceField } from "./place-field";

const words = texts.closer.pins;
const CM_PER_M = 100;
const MV_PER_V = 1000;
/** A field that is shown as 0.000 V/cm points nowhere. */
const LEAST_V_PER_CM = 0.0005;

/** Strength and direction of the field, from high to low potential. */
function fieldWords({ fieldVPerM, directionDeg }: FieldReading): string {
  const strength = fieldVPerM / CM_PER_M;
  return strength < LEAST_V_PER_CM ? words.fieldText(fixed(strength, 3)) : words.fieldTowards(fixed(strength, 3), fixed(directionDeg, 0));
}

function PinRow(props: {
  readonly pin: Pin;
  readonly reading: FieldReading | undefined;
  readonly setup: Setup;
  readonly closerLook: CloserLook;
}) {
  const { pin, reading, setup, closerLook } = props;
  const { number, at } = pin;
  const on = reading?.inside === null || reading === undefined ? undefined : thingById(setup, reading.inside);
  const coordinate = (axis: "x" | "y") => (
    <td>
      <PlaceField
        label={words[axis](number)}
        axis={axis}
        tray={setup.tray}
        valueMm={at[axis === "x" ? 0 : 1]}
        bare
        onSet={(value) => closerLook.movePin(number, axis === "x" ? [value, at[1]] : [at[0], value])}
      />
    </td>
  );
  return (
    <tbody>
      <tr>
        <th scope="rowgroup" rowSpan={2}>
          {number}
        </th>
        {coordinate("x")}
        {coordinate("y")}
        <td>
          <IconButton icon="remove" name={words.drop(number)} onPress={() => closerLook.dropPin(number)} />
        </td>
      </tr>
      <tr>
        <td colSpan={3} className="pin-reads">
          {reading === undefined || reading.volts === null ? (
            words.nothing
          ) : (
            <>
              <strong>{boundedText({ value: reading.volts, error: reading.voltsError }, "V")}</strong>{" "}
              {words.bound(trimmed(MV_PER_V * reading.voltsError, reading.voltsError < 1e-3 ? 2 : 0))}
              <span>{on === undefined ? fieldWords(reading) : words.on(thingName(on))}</span>
            </>
          )}
        </td>
      </tr>
    </tbody>
  );
}

/** Pinned probes: where they are, and what a probe would read there, as the tray changes. */
export function Pins(props: {
  readonly setup: Setup;
  readonly closerLook: CloserLook;
  readonly placing: boolean;
  readonly onPlacing: () => void;
}) {
  const { setup, closerLook, placing, onPlacing } = props;
  const pins = useStore(closerLook, (state) => state.pins);
  const readings = useStore(closerLook, (state) => state.pinReadings);
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const full = pins.length >= MOST_PINS;
  return (
    <section aria-label={words.title}>
      <h3>{words.title}</h3>
      {pins.length === 0 && <p className="hint">{words.none}</p>}
      {pins.length > 0 && (
        <table className="pins" aria-label={words.table}>
          <thead>
            <tr>
              <th scope="col">{words.number}</th>
              <th scope="col">x</th>
              <th scope="col">y</th>
              <td />
            </tr>
          </thead>
          {pins.map((pin, index) => (
            <PinRow key={pin.number} pin={pin} reading={readings[index]} setup={setup} closerLook={closerLook} />
          ))}
        </table>
      )}
      <div className="choices">
        <button type="button" aria-pressed={placing} disabled={full} onClick={onPlacing}>
          {words.place}
        </button>
        <button type="button" disabled={full} onClick={() => closerLook.addPin([lengthMm / 2, widthMm / 2])}>
          {words.add}
        </button>
      </div>
    </section>
  );
}

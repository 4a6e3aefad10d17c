import { useStore } from "zustand";
import type { Problem } from "../../shared-types/result";
import type { Tray } from "../../shared-types/setup";
import { changeSupply, changeTray, changeWater, setTitle } from "../document/commands/bench";
import type { Document } from "../document/document";
import type { Edit } from "../document/edit";
import { ChoiceField, NumberField, Switch, TextField } from "./number-field";
import { ANGLES_IN_DEG, LENGTHS_IN_MM } from "./read-number";
import type { WindowStore } from "./window-state";

const TRAY_SHAPES = [
  ["rectangle", "Rectangular"],
  ["circle", "Round"],
] as const;

/** The same tray in the other shape, as wide as it was. */
function reshaped(tray: Tray, shape: Tray["shape"]): Tray {
  if (tray.shape === shape) return tray;
  const { wallHeightMm, baseMm, baseMaterial } = tray;
  const common = { wallHeightMm, baseMm, baseMaterial };
  return tray.shape === "circle"
    ? { shape: "rectangle", lengthMm: tray.diameterMm, widthMm: tray.diameterMm, ...common }
    : { shape: "circle", diameterMm: Math.min(tray.lengthMm, tray.widthMm), ...common };
}

/** The tray, its water and the supply, as far as laying out needs them. */
export function TrayCard({ document }: { readonly document: Document }) {
  const setup = useStore(document, (state) => state.setup);
  const { tray, water, supply } = setup;
  const tried = (edit: Edit): readonly Problem[] => {
    const result = document.run(edit);
    return result.ok ? [] : result.problems;
  };
  const length = (label: string, key: "lengthMm" | "widthMm" | "diameterMm" | "wallHeightMm", value: number) => (
    <NumberField
      label={label}
      unit="mm"
      units={LENGTHS_IN_MM}
      value={value}
      step={5}
      setting={`tray.${key}`}
      onSet={(size) => tried(changeTray({ ...tray, [key]: size } as Tray))}
    />
  );
  return (
    <section className="card" aria-label="Tray and water">
      <h2>Tray</h2>
      <TextField label="Title" value={setup.title} onSet={(title) => tried(setTitle(title))} />
      <ChoiceField
        label="Shape"
        value={tray.shape}
        choices={TRAY_SHAPES}
        onSet={(shape) => document.run(changeTray(reshaped(tray, shape)))}
      />
      {tray.shape === "rectangle" ? (
        <div className="pair">
          {length("Length (x)", "lengthMm", tray.lengthMm)}
          {length("Width (y)", "widthMm", tray.widthMm)}
        </div>
      ) : (
        length("Diameter", "diameterMm", tray.diameterMm)
      )}
      {length("Wall height", "wallHeightMm", tray.wallHeightMm)}
      <h3>Water</h3>
      <NumberField
        label="Depth at the centre"
        unit="mm"
        units={LENGTHS_IN_MM}
        value={water.depthMm}
        step={0.5}
        setting="water.depthMm"
        onSet={(depthMm) => tried(changeWater({ depthMm }))}
      />
      <div className="pair">
        <NumberField
          label="Deeper to +x"
          unit="°"
          units={ANGLES_IN_DEG}
          value={water.tiltXDeg}
          step={0.1}
          setting="water.tiltXDeg"
          onSet={(tiltXDeg) => tried(changeWater({ tiltXDeg }))}
        />
        <NumberField
          label="Deeper to +y"
          unit="°"
          units={ANGLES_IN_DEG}
          value={water.tiltYDeg}
          step={0.1}
          setting="water.tiltYDeg"
          onSet={(tiltYDeg) => tried(changeWater({ tiltYDeg }))}
        />
      </div>
      <NumberField
        label="Conductivity at 25 °C"
        unit="µS/cm"
        value={water.conductivityUsPerCm}
        step={10}
        setting="water.conductivityUsPerCm"
        onSet={(conductivityUsPerCm) => tried(changeWater({ conductivityUsPerCm }))}
      />
      <h3>Supply</h3>
      <NumberField
        label={supply.waveform === "ac" ? "Voltage (rms)" : "Voltage"}
        unit="V"
        value={supply.volts}
        step={0.5}
        setting="supply.volts"
        onSet={(volts) => tried(changeSupply({ volts }))}
      />
    </section>
  );
}

const SHOWN = [
  ["picture", "Potential in colours"],
  ["equipotentials", "Equipotentials"],
  ["fieldLines", "Field lines"],
  ["points", "Probe points"],
  ["tags", "Tags of parts"],
] as const;

/** What the tray shows. */
export function ShownCard({ document, window }: { readonly document: Document; readonly window: WindowStore }) {
  const shown = useStore(window, (state) => state.shown);
  const snapping = useStore(document, (state) => state.snapping);
  return (
    <section className="card" aria-label="What the tray shows">
      <h2>On the tray</h2>
      {SHOWN.map(([key, label]) => (
        <Switch key={key} label={label} on={shown[key]} onSet={(on) => window.set({ shown: { ...shown, [key]: on } })} />
      ))}
      <Switch label="Snap to whole millimetres" on={snapping} onSet={document.setSnapping} />
    </section>
  );
}

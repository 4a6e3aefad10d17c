import { useStore } from "zustand";
import type { Supply, Tray } from "../../shared-types/setup";
import { changeSupply, changeTray, changeWater, setNotes, setTitle } from "../document/commands/bench";
import type { Document } from "../document/document";
import { texts } from "../texts/texts";
import { tried } from "./field-surroundings";
import { ChoiceField, choicesOf, TextField } from "./fields";
import { NumberField } from "./number-field";
import { waveformChange } from "./waveform-change";

/** The same tray in the other shape, as wide as it was. */
function reshaped(tray: Tray, shape: Tray["shape"]): Tray {
  if (tray.shape === shape) return tray;
  const { wallHeightMm, baseMm, baseMaterial } = tray;
  const common = { wallHeightMm, baseMm, baseMaterial };
  return tray.shape === "circle"
    ? { shape: "rectangle", lengthMm: tray.diameterMm, widthMm: tray.diameterMm, ...common }
    : { shape: "circle", diameterMm: Math.min(tray.lengthMm, tray.widthMm), ...common };
}

/** The tray itself: title, shape and sizes. */
export function TrayCard({ document }: { readonly document: Document }) {
  const title = useStore(document, (state) => state.setup.title);
  const notes = useStore(document, (state) => state.setup.notes);
  const tray = useStore(document, (state) => state.setup.tray);
  const words = texts.layOut.tray;
  const length = (key: "lengthMm" | "widthMm" | "diameterMm" | "wallHeightMm" | "baseMm", value: number, step = 5) => (
    <NumberField
      label={words[key]}
      unit="mm"
      value={value}
      step={step}
      setting={`tray.${key}`}
      onSet={(size, stepping) => tried(document, changeTray({ ...tray, [key]: size } as Tray), stepping)}
    />
  );
  const bases: readonly (readonly [string, string])[] = choicesOf(words.bases);
  return (
    <section className="card" aria-label={words.title}>
      <h2>{words.title}</h2>
      <TextField label={words.setupTitle} value={title} onSet={(next) => tried(document, setTitle(next))} />
      <div className="grid-3">
        <ChoiceField
          label={words.shape}
          value={tray.shape}
          choices={[
            ["rectangle", words.rectangle],
            ["circle", words.circle],
          ]}
          onSet={(shape) => document.run(changeTray(reshaped(tray, shape)))}
        />
        {tray.shape === "rectangle" ? (
          <>
            {length("lengthMm", tray.lengthMm)}
            {length("widthMm", tray.widthMm)}
          </>
        ) : (
          length("diameterMm", tray.diameterMm)
        )}
      </div>
      <div className="grid-3">
        <ChoiceField
          label={words.base}
          value={tray.baseMaterial}
          setting="tray.baseMaterial"
          choices={bases}
          onSet={(baseMaterial) => document.run(changeTray({ ...tray, baseMaterial }))}
        />
        {length("baseMm", tray.baseMm, 1)}
        {length("wallHeightMm", tray.wallHeightMm)}
      </div>
      <TextField label={words.notes} lines={2} value={notes} onSet={(next) => tried(document, setNotes(next))} />
    </section>
  );
}

/** The water, as far as laying out needs it. */
export function WaterCard({ document }: { readonly document: Document }) {
  const water = useStore(document, (state) => state.setup.water);
  const words = texts.layOut.water;
  const field = (
    key: "depthMm" | "tiltXDeg" | "tiltYDeg" | "conductivityUsPerCm" | "temperatureC",
    label: string,
    unit: string,
    step: number,
  ) => (
    <NumberField
      label={label}
      unit={unit}
      value={water[key]}
      step={step}
      setting={`water.${key}`}
      onSet={(value, stepping) => tried(document, changeWater({ [key]: value }), stepping)}
    />
  );
  return (
    <section className="card" aria-label={words.title}>
      <h2>{words.title}</h2>
      {field("depthMm", words.depth, "mm", 0.5)}
      {field("conductivityUsPerCm", words.conductivity, "µS/cm", 10)}
      {field("temperatureC", words.temperature, "°C", 0.5)}
      <div className="grid-2">
        {field("tiltXDeg", words.tiltX, "°", 0.1)}
        {field("tiltYDeg", words.tiltY, "°", 0.1)}
      </div>
    </section>
  );
}

/** The supply, as far as laying out needs it. */
export function SupplyCard({ document }: { readonly document: Document }) {
  const supply = useStore(document, (state) => state.setup.supply);
  const words = texts.layOut.supply;
  const set = (change: Partial<Supply>, stepping = false) => tried(document, changeSupply(change), stepping);
  return (
    <section className="card" aria-label={words.title}>
      <h2>{words.title}</h2>
      <div className="grid-3">
        <NumberField
          label={supply.waveform === "ac" ? words.voltsAc : words.voltsDc}
          unit="V"
          value={supply.volts}
          step={0.5}
          setting="supply.volts"
          onSet={(volts, stepping) => set({ volts }, stepping)}
        />
        <ChoiceField
          label={words.waveform}
          value={supply.waveform}
          setting="supply.waveform"
          choices={[
            ["ac", words.ac],
            ["dc", words.dc],
          ]}
          onSet={(waveform) => set(waveformChange(supply, waveform))}
        />
        {supply.waveform === "ac" && (
          <NumberField
            label={words.frequency}
            unit="Hz"
            value={supply.frequencyHz}
            step={10}
            setting="supply.frequencyHz"
            onSet={(frequencyHz, stepping) => set({ frequencyHz }, stepping)}
          />
        )}
      </div>
      <p className="hint">{words.more}</p>
    </section>
  );
}

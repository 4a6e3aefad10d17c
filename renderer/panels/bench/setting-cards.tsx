import type { ReactNode } from "react";
import type { BenchNumbers } from "../../../shared-types/bench";
import type { Problem } from "../../../shared-types/result";
import type { Setup } from "../../../shared-types/setup";
import { changeInterface, changeMeter, changeProbing, changeSession, changeSupply, changeWater } from "../../document/commands/bench";
import type { Document } from "../../document/document";
import type { Edit } from "../../document/edit";
import { ChoiceField, Switch } from "../fields";
import { NumberField } from "../number-field";
import { OptionalNumber } from "./optional-number";
import { ReadoutList } from "./readout-list";
import { circuitReadouts, heatAndGasReadouts, meterReadouts, type Readout, surfaceReadouts, waterReadouts } from "./readouts";

export interface SettingCardProps {
  readonly document: Document;
  readonly setup: Setup;
  /** Null while the setup has no plan. */
  readonly bench: BenchNumbers | null;
}

/** Runs an edit. @returns why it was refused. */
const trying = (document: Document, edit: Edit): readonly Problem[] => {
  const result = document.run(edit);
  return result.ok ? [] : result.problems;
};

function Card({ title, lines, children }: { readonly title: string; readonly lines: readonly Readout[]; readonly children: ReactNode }) {
  const id = `bench-${title.toLowerCase().replace(/\s/g, "-")}`;
  return (
    <section className="card" aria-labelledby={id}>
      <h2 id={id}>{title}</h2>
      <div className="grid-2 bench-settings">{children}</div>
      <ReadoutList lines={lines} />
    </section>
  );
}

const SALTS = [
  ["none", "none (natural water)"],
  ["sodium-chloride", "sodium chloride"],
  ["potassium-chloride", "potassium chloride"],
  ["magnesium-sulfate", "magnesium sulfate"],
  ["sodium-carbonate", "sodium carbonate"],
] as const;

export function WaterCard({ document, setup, bench }: SettingCardProps) {
  const { water } = setup;
  const set = (change: Parameters<typeof changeWater>[0]) => trying(document, changeWater(change));
  return (
    <Card title="Water" lines={bench === null ? [] : waterReadouts(setup, bench)}>
      <NumberField
        label="Depth at the centre"
        unit="mm"
        value={water.depthMm}
        step={0.5}
        setting="water.depthMm"
        onSet={(depthMm) => set({ depthMm })}
      />
      <NumberField
        label="Conductivity at 25 °C"
        unit="µS/cm"
        value={water.conductivityUsPerCm}
        step={10}
        setting="water.conductivityUsPerCm"
        onSet={(conductivityUsPerCm) => set({ conductivityUsPerCm })}
      />
      <NumberField
        label="Temperature"
        unit="°C"
        value={water.temperatureC}
        step={0.5}
        setting="water.temperatureC"
        onSet={(temperatureC) => set({ temperatureC })}
      />
      <ChoiceField label="Salt" value={water.salt} setting="water.salt" choices={SALTS} onSet={(salt) => set({ salt })} />
      <OptionalNumber
        label="Bring it to"
        unit="µS/cm"
        value={water.targetConductivityUsPerCm}
        setting="water.targetConductivityUsPerCm"
        absent="as it is"
        onSet={(targetConductivityUsPerCm) => set({ targetConductivityUsPerCm })}
      />
    </Card>
  );
}

const SOURCES = [
  ["safety-isolated", "safety isolating transformer"],
  ["battery", "battery"],
  ["not isolated", "anything else"],
] as const;
const WAVEFORMS = [
  ["ac", "AC"],
  ["dc", "DC"],
] as const;

export function SupplyCard({ document, setup, bench }: SettingCardProps) {
  const { supply } = setup;
  const set = (change: Parameters<typeof changeSupply>[0]) => trying(document, changeSupply(change));
  return (
    <Card title="Supply and circuit" lines={bench === null ? [] : circuitReadouts(setup, bench)}>
      <ChoiceField
        label="Current"
        value={supply.waveform}
        setting="supply.waveform"
        choices={WAVEFORMS}
        onSet={(waveform) => set({ waveform })}
      />
      <NumberField label="Voltage" unit="V" value={supply.volts} step={0.1} setting="supply.volts" onSet={(volts) => set({ volts })} />
      {supply.waveform === "ac" && (
        <NumberField
          label="Frequency"
          unit="Hz"
          value={supply.frequencyHz}
          step={1}
          setting="supply.frequencyHz"
          onSet={(frequencyHz) => set({ frequencyHz })}
        />
      )}
      <OptionalNumber
        label="With nothing connected"
        unit="V"
        value={supply.openCircuitVolts}
        setting="supply.openCircuitVolts"
        absent="not measured"
        onSet={(openCircuitVolts) => set({ openCircuitVolts })}
      />
      <NumberField
        label="Current limit"
        unit="A"
        value={supply.currentLimitA}
        step={0.1}
        setting="supply.currentLimitA"
        onSet={(currentLimitA) => set({ currentLimitA })}
      />
      <ChoiceField label="Source" value={supply.source} setting="supply.source" choices={SOURCES} onSet={(source) => set({ source })} />
    </Card>
  );
}

export function SurfaceCard({ document, setup, bench }: SettingCardProps) {
  const { doubleLayerUfPerCm2, electrodeDropVolts, inReadings } = setup.interface;
  const set = (change: Parameters<typeof changeInterface>[0]) => trying(document, changeInterface(change));
  return (
    <Card title="Electrode surfaces" lines={bench === null ? [] : surfaceReadouts(bench)}>
      {setup.supply.waveform === "ac" ? (
        <OptionalNumber
          label="Double layer"
          unit="µF/cm²"
          value={doubleLayerUfPerCm2}
          setting="interface.doubleLayerUfPerCm2"
          absent="by the metal"
          onSet={(value) => set({ doubleLayerUfPerCm2: value })}
        />
      ) : (
        <OptionalNumber
          label="Measured drop, both"
          unit="V"
          value={electrodeDropVolts}
          setting="interface.electrodeDropVolts"
          absent="by the metal"
          onSet={(value) => set({ electrodeDropVolts: value })}
        />
      )}
      <Switch
        label="Expected readings allow for this loss"
        on={inReadings}
        setting="interface.inReadings"
        onSet={(on) => set({ inReadings: on })}
      />
    </Card>
  );
}

export function MeterCard({ document, setup, bench }: SettingCardProps) {
  const { meter, probing } = setup;
  const set = (change: Parameters<typeof changeMeter>[0]) => trying(document, changeMeter(change));
  return (
    <Card title="Meter and probe" lines={bench === null ? [] : meterReadouts(bench)}>
      <NumberField
        label="Input"
        unit="MΩ"
        value={meter.inputMegohm}
        step={1}
        setting="meter.inputMegohm"
        onSet={(inputMegohm) => set({ inputMegohm })}
      />
      <NumberField
        label="Input"
        unit="pF"
        value={meter.inputPicofarad}
        step={10}
        setting="meter.inputPicofarad"
        onSet={(inputPicofarad) => set({ inputPicofarad })}
      />
      <NumberField label="Counts" unit="" value={meter.counts} step={1000} setting="meter.counts" onSet={(counts) => set({ counts })} />
      <NumberField
        label="Accuracy"
        unit="%"
        value={meter.accuracyPercent}
        step={0.1}
        setting="meter.accuracyPercent"
        onSet={(accuracyPercent) => set({ accuracyPercent })}
      />
      <NumberField
        label="and"
        unit="digits"
        value={meter.accuracyDigits}
        step={1}
        setting="meter.accuracyDigits"
        onSet={(accuracyDigits) => set({ accuracyDigits })}
      />
      <NumberField label="AC from" unit="Hz" value={meter.acLowHz} step={5} setting="meter.acLowHz" onSet={(acLowHz) => set({ acLowHz })} />
      <NumberField
        label="AC to"
        unit="Hz"
        value={meter.acHighHz}
        step={50}
        setting="meter.acHighHz"
        onSet={(acHighHz) => set({ acHighHz })}
      />
      <NumberField
        label="Probe's tip"
        unit="mm"
        value={probing.probeTipMm}
        step={0.1}
        setting="probing.probeTipMm"
        onSet={(probeTipMm) => trying(document, changeProbing({ probeTipMm }))}
      />
    </Card>
  );
}

export function SessionCard({ document, setup, bench }: SettingCardProps) {
  const { session, supply } = setup;
  const set = (change: Parameters<typeof changeSession>[0]) => trying(document, changeSession(change));
  return (
    <Card title="Heat and gas" lines={bench === null ? [] : heatAndGasReadouts(setup, bench)}>
      <NumberField
        label="Session"
        unit="min"
        value={session.minutes}
        step={5}
        setting="session.minutes"
        onSet={(minutes) => set({ minutes })}
      />
      <NumberField label="Trays" unit="" value={session.trays} step={1} setting="session.trays" onSet={(trays) => set({ trays })} />
      {supply.waveform === "dc" && (
        <>
          <NumberField
            label="Air over one tray"
            unit="L"
            value={session.hoodLitres}
            step={10}
            setting="session.hoodLitres"
            onSet={(hoodLitres) => set({ hoodLitres })}
          />
          <NumberField
            label="Room"
            unit="m³"
            value={session.roomCubicMetres}
            step={10}
            setting="session.roomCubicMetres"
            onSet={(roomCubicMetres) => set({ roomCubicMetres })}
          />
        </>
      )}
    </Card>
  );
}

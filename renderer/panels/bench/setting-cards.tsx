import type { ReactNode } from "react";
import type { BenchNumbers } from "../../../shared-types/bench";

import type { Setup } from "../../../shared-types/setup";
import { changeInterface, changeMeter, changeProbing, changeSession, changeSupply, changeWater } from "../../document/commands/bench";
import type { Document } from "../../document/document";

import { texts } from "../../texts/texts";
import { tried } from "../field-surroundings";
import { ChoiceField, choicesOf, Switch } from "../fields";
import { NumberField } from "../number-field";
import { waveformChange } from "../waveform-change";
import { OptionalNumber } from "./optional-number";
import { ReadoutList } from "./readout-list";
import { circuitReadouts, heatAndGasReadouts, meterReadouts, type Readout, surfaceReadouts, waterReadouts } from "./readouts";

const words = texts.bench;
const SALTS: readonly (readonly [string, string])[] = choicesOf(words.water.salts);
const SOURCES: readonly (readonly [string, string])[] = choicesOf(words.supply.sources);

export interface SettingCardProps {
  readonly document: Document;
  readonly setup: Setup;
  /** Null while the setup has no plan. */
  readonly bench: BenchNumbers | null;
}

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

export function WaterCard({ document, setup, bench }: SettingCardProps) {
  const { water } = setup;
  const set = (change: Parameters<typeof changeWater>[0], stepping = false) => tried(document, changeWater(change), stepping);
  return (
    <Card title={words.water.title} lines={bench === null ? [] : waterReadouts(setup, bench)}>
      <NumberField
        label={words.water.depth}
        unit="mm"
        value={water.depthMm}
        step={0.5}
        setting="water.depthMm"
        onSet={(depthMm, stepping) => set({ depthMm }, stepping)}
      />
      <NumberField
        label={words.water.conductivity}
        unit="µS/cm"
        value={water.conductivityUsPerCm}
        step={10}
        setting="water.conductivityUsPerCm"
        onSet={(conductivityUsPerCm, stepping) => set({ conductivityUsPerCm }, stepping)}
      />
      <NumberField
        label={words.water.temperature}
        unit="°C"
        value={water.temperatureC}
        step={0.5}
        setting="water.temperatureC"
        onSet={(temperatureC, stepping) => set({ temperatureC }, stepping)}
      />
      <ChoiceField label={words.water.salt} value={water.salt} setting="water.salt" choices={SALTS} onSet={(salt) => set({ salt })} />
      <OptionalNumber
        label={words.water.target}
        unit="µS/cm"
        value={water.targetConductivityUsPerCm}
        setting="water.targetConductivityUsPerCm"
        absent={words.water.asItIs}
        onSet={(targetConductivityUsPerCm) => set({ targetConductivityUsPerCm })}
      />
    </Card>
  );
}

export function SupplyCard({ document, setup, bench }: SettingCardProps) {
  const { supply } = setup;
  const set = (change: Parameters<typeof changeSupply>[0], stepping = false) => tried(document, changeSupply(change), stepping);
  return (
    <Card title={words.supply.title} lines={bench === null ? [] : circuitReadouts(setup, bench)}>
      <ChoiceField
        label={words.supply.waveform}
        value={supply.waveform}
        setting="supply.waveform"
        choices={choicesOf<"ac" | "dc">(words.supply.waveforms)}
        onSet={(waveform) => set(waveformChange(supply, waveform))}
      />
      <NumberField
        label={words.supply.volts}
        unit="V"
        value={supply.volts}
        step={0.1}
        setting="supply.volts"
        onSet={(volts, stepping) => set({ volts }, stepping)}
      />
      {supply.waveform === "ac" && (
        <NumberField
          label={words.supply.frequency}
          unit="Hz"
          value={supply.frequencyHz}
          step={1}
          setting="supply.frequencyHz"
          onSet={(frequencyHz, stepping) => set({ frequencyHz }, stepping)}
        />
      )}
      <OptionalNumber
        label={words.supply.openCircuit}
        unit="V"
        value={supply.openCircuitVolts}
        setting="supply.openCircuitVolts"
        absent={words.supply.notMeasured}
        onSet={(openCircuitVolts) => set({ openCircuitVolts })}
      />
      <NumberField
        label={words.supply.limit}
        unit="A"
        value={supply.currentLimitA}
        step={0.1}
        setting="supply.currentLimitA"
        onSet={(currentLimitA, stepping) => set({ currentLimitA }, stepping)}
      />
      <ChoiceField
        label={words.supply.source}
        value={supply.source}
        setting="supply.source"
        choices={SOURCES}
        onSet={(source) => set({ source })}
      />
    </Card>
  );
}

export function SurfaceCard({ document, setup, bench }: SettingCardProps) {
  const { doubleLayerUfPerCm2, electrodeDropVolts, inReadings } = setup.interface;
  const set = (change: Parameters<typeof changeInterface>[0]) => tried(document, changeInterface(change));
  return (
    <Card title={words.surfaces.title} lines={bench === null ? [] : surfaceReadouts(bench)}>
      {setup.supply.waveform === "ac" ? (
        <OptionalNumber
          label={words.surfaces.doubleLayer}
          unit="µF/cm²"
          value={doubleLayerUfPerCm2}
          setting="interface.doubleLayerUfPerCm2"
          absent={words.surfaces.byTheMetal}
          onSet={(value) => set({ doubleLayerUfPerCm2: value })}
        />
      ) : (
        <OptionalNumber
          label={words.surfaces.drop}
          unit="V"
          value={electrodeDropVolts}
          setting="interface.electrodeDropVolts"
          absent={words.surfaces.byTheMetal}
          onSet={(value) => set({ electrodeDropVolts: value })}
        />
      )}
      <Switch label={words.surfaces.inReadings} on={inReadings} setting="interface.inReadings" onSet={(on) => set({ inReadings: on })} />
    </Card>
  );
}

export function MeterCard({ document, setup, bench }: SettingCardProps) {
  const { meter, probing } = setup;
  const set = (change: Parameters<typeof changeMeter>[0], stepping = false) => tried(document, changeMeter(change), stepping);
  return (
    <Card title={words.meter.title} lines={bench === null ? [] : meterReadouts(bench)}>
      <NumberField
        label={words.meter.input}
        unit="MΩ"
        value={meter.inputMegohm}
        step={1}
        setting="meter.inputMegohm"
        onSet={(inputMegohm, stepping) => set({ inputMegohm }, stepping)}
      />
      <NumberField
        label={words.meter.input}
        unit="pF"
        value={meter.inputPicofarad}
        step={10}
        setting="meter.inputPicofarad"
        onSet={(inputPicofarad, stepping) => set({ inputPicofarad }, stepping)}
      />
      <NumberField
        label={words.meter.counts}
        unit=""
        value={meter.counts}
        step={1000}
        setting="meter.counts"
        onSet={(counts, stepping) => set({ counts }, stepping)}
      />
      <NumberField
        label={words.meter.accuracy}
        unit="%"
        value={meter.accuracyPercent}
        step={0.1}
        setting="meter.accuracyPercent"
        onSet={(accuracyPercent, stepping) => set({ accuracyPercent }, stepping)}
      />
      <NumberField
        label={words.meter.digits}
        unit="digits"
        value={meter.accuracyDigits}
        step={1}
        setting="meter.accuracyDigits"
        onSet={(accuracyDigits, stepping) => set({ accuracyDigits }, stepping)}
      />
      <NumberField
        label={words.meter.acFrom}
        unit="Hz"
        value={meter.acLowHz}
        step={5}
        setting="meter.acLowHz"
        onSet={(acLowHz, stepping) => set({ acLowHz }, stepping)}
      />
      <NumberField
        label={words.meter.acTo}
        unit="Hz"
        value={meter.acHighHz}
        step={50}
        setting="meter.acHighHz"
        onSet={(acHighHz, stepping) => set({ acHighHz }, stepping)}
      />
      <NumberField
        label={words.meter.tip}
        unit="mm"
        value={probing.probeTipMm}
        step={0.1}
        setting="probing.probeTipMm"
        onSet={(probeTipMm, stepping) => tried(document, changeProbing({ probeTipMm }), stepping)}
      />
    </Card>
  );
}

export function SessionCard({ document, setup, bench }: SettingCardProps) {
  const { session, supply } = setup;
  const set = (change: Parameters<typeof changeSession>[0], stepping = false) => tried(document, changeSession(change), stepping);
  return (
    <Card title={words.session.title} lines={bench === null ? [] : heatAndGasReadouts(setup, bench)}>
      <NumberField
        label={words.session.minutes}
        unit="min"
        value={session.minutes}
        step={5}
        setting="session.minutes"
        onSet={(minutes, stepping) => set({ minutes }, stepping)}
      />
      <NumberField
        label={words.session.trays}
        unit=""
        value={session.trays}
        step={1}
        setting="session.trays"
        onSet={(trays, stepping) => set({ trays }, stepping)}
      />
      {supply.waveform === "dc" && (
        <>
          <NumberField
            label={words.session.hood}
            unit="L"
            value={session.hoodLitres}
            step={10}
            setting="session.hoodLitres"
            onSet={(hoodLitres, stepping) => set({ hoodLitres }, stepping)}
          />
          <NumberField
            label={words.session.room}
            unit="m³"
            value={session.roomCubicMetres}
            step={10}
            setting="session.roomCubicMetres"
            onSet={(roomCubicMetres, stepping) => set({ roomCubicMetres }, stepping)}
          />
        </>
      )}
    </Card>
  );
}

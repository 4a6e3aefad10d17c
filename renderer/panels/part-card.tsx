import { useStore } from "zustand";
import type { Problem } from "../../shared-types/result";
import type { Part, PartRole, Setup, Shape } from "../../shared-types/setup";
import { setThickness } from "../document/commands/bench";
import { moveToGap } from "../document/commands/gap";
import { duplicateThings, removeThings, setHeight, setMaterial, setName, setRole, setTap } from "../document/commands/parts";
import { type AlignTo, alignThings, distributeThings, mirrorThings, placeThing, resizeThing } from "../document/commands/placing";
import type { Document } from "../document/document";
import { type Edit, isPart, type Thing, thingName, thingsById } from "../document/edit";
import { trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { gapMm } from "../engine/geometry/clearance";
import { boundsOf, outlineOf } from "../engine/geometry/outline";
import { outlined } from "../engine/geometry/overlap";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { Icon } from "./icons";
import { ChoiceField, NumberField, TextField } from "./number-field";
import { ANGLES_IN_DEG, LENGTHS_IN_MM } from "./read-number";

const ROLES: readonly (readonly [PartRole, string])[] = [
  ["electrode", "Electrode (wired)"],
  ["floating", "Floating conductor"],
  ["insulator", "Insulator"],
];

const MATERIALS: readonly (readonly [string, string])[] = [
  ["brass", "brass"],
  ["copper", "copper"],
  ["stainless-steel", "stainless steel"],
  ["steel", "steel"],
  ["aluminium", "aluminium"],
  ["graphite", "graphite"],
  ["acrylic", "acrylic"],
  ["glass", "glass"],
  ["wood", "wood"],
];

const SIZES: Readonly<Record<string, string>> = {
  lengthMm: "Length",
  widthMm: "Width",
  diameterMm: "Diameter",
  outerMm: "Outer diameter",
  innerMm: "Inner diameter",
  sweepDeg: "Sweep",
  wallMm: "Wall",
};

/** Runs an edit. @returns why it was refused, empty when it went through. */
const tried = (document: Document, edit: Edit): readonly Problem[] => {
  const result = document.run(edit);
  return result.ok ? [] : result.problems;
};

function SizeFields({ document, thing }: { readonly document: Document; readonly thing: Thing }) {
  const { shape } = thing;
  if (shape.kind === "polygon") {
    return (
      <p className="hint">
        {shape.pointsMm.length} corners, from {shape.pointsMm.map(([x, y]) => `(${trimmed(x, 1)}, ${trimmed(y, 1)})`).join(" ")} mm about
        its point.
      </p>
    );
  }
  return Object.entries(shape)
    .filter(([key]) => key !== "kind")
    .map(([key, value]) => (
      <NumberField
        key={key}
        label={SIZES[key] ?? key}
        unit={key === "sweepDeg" ? "°" : "mm"}
        units={key === "sweepDeg" ? ANGLES_IN_DEG : LENGTHS_IN_MM}
        value={Number(value)}
        step={1}
        onSet={(size) => tried(document, resizeThing(document.getState().setup, thing.id, { ...shape, [key]: size } as Shape))}
      />
    ));
}

function WiringFields({ document, setup, part }: { readonly document: Document; readonly setup: Setup; readonly part: Part }) {
  const ids = [part.id];
  const { volts } = setup.supply;
  return (
    <>
      <ChoiceField label="Role" value={part.role} choices={ROLES} onSet={(role) => document.run(setRole(setup, ids, role))} />
      {part.role === "electrode" && (
        <>
          <fieldset className="leads">
            <legend>Lead</legend>
            {[
              [0, "− common"],
              [1, "+ live"],
            ].map(([tap, text]) => (
              <button
                key={text}
                type="button"
                aria-pressed={part.tap === tap}
                onClick={() => document.run(setTap(setup, ids, Number(tap)))}
              >
                {text}
              </button>
            ))}
          </fieldset>
          <NumberField
            label="Potential"
            unit="V"
            value={Number((part.tap * volts).toFixed(6))}
            step={0.5}
            onSet={(potential) => tried(document, setTap(setup, ids, potential / volts))}
          />
        </>
      )}
      <ChoiceField
        label="Material"
        value={part.material}
        choices={MATERIALS}
        onSet={(material) => document.run(setMaterial(setup, ids, material))}
      />
      <NumberField
        label="Height"
        unit="mm"
        units={LENGTHS_IN_MM}
        value={part.heightMm}
        step={1}
        setting={`parts[${setup.parts.indexOf(part)}].heightMm`}
        onSet={(heightMm) => tried(document, setHeight(setup, ids, heightMm))}
      />
    </>
  );
}

function Reading({ planning, part }: { readonly planning: Planning; readonly part: Part }) {
  const plan = useStore(planning, (state) => (state.refusal === null ? state.plan : null));
  const reading = plan?.conductors.find(({ id }) => id === part.id);
  if (reading === undefined) return null;
  return (
    <dl className="readouts">
      <div>
        <dt>Potential</dt>
        <dd>{Number.isNaN(reading.volts) ? "undetermined" : `${trimmed(reading.volts, 4)} V`}</dd>
      </div>
      {reading.role === "electrode" && (
        <div>
          <dt>Current into the water</dt>
          <dd>{trimmed(reading.currentA * 1000, 4)} mA</dd>
        </div>
      )}
    </dl>
  );
}

const ALIGNMENTS: readonly (readonly [AlignTo, string])[] = [
  ["left", "Left edges"],
  ["centre", "Centres, in x"],
  ["right", "Right edges"],
  ["top", "Far edges"],
  ["middle", "Centres, in y"],
  ["bottom", "Near edges"],
];

const boxOf = (thing: Thing): readonly [number, number, number, number] => boundsOf(outlineOf(thing));
const gapOf = (a: Thing, b: Thing): number => gapMm(outlined(a), outlined(b));

/** What can be done with several parts at once. */
function ManyTools({ document, setup, ids }: { readonly document: Document; readonly setup: Setup; readonly ids: readonly string[] }) {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const things = thingsById(setup, ids);
  return (
    <>
      {things.length === 2 && (
        <NumberField
          label="Clear between the two"
          unit="mm"
          units={LENGTHS_IN_MM}
          value={Number(gapOf(things[0], things[1]).toFixed(3))}
          step={1}
          onSet={(wantedMm) => tried(document, moveToGap(setup, things[0].id, things[1].id, wantedMm, gapOf))}
        />
      )}
      <h3>Line up</h3>
      <div className="grid-2">
        {ALIGNMENTS.map(([to, text]) => (
          <button key={to} type="button" onClick={() => document.run(alignThings(setup, ids, to, boxOf, [0, 0, lengthMm, widthMm]))}>
            {text}
          </button>
        ))}
      </div>
      <h3>Equal gaps</h3>
      <div className="grid-2">
        <button type="button" disabled={things.length < 3} onClick={() => document.run(distributeThings(setup, ids, "x", boxOf))}>
          Along x
        </button>
        <button type="button" disabled={things.length < 3} onClick={() => document.run(distributeThings(setup, ids, "y", boxOf))}>
          Along y
        </button>
      </div>
      <h3>Mirror</h3>
      <div className="grid-2">
        <button type="button" onClick={() => document.run(mirrorThings(setup, ids, "left-right", boxOf))}>
          Left and right
        </button>
        <button type="button" onClick={() => document.run(mirrorThings(setup, ids, "top-bottom", boxOf))}>
          Near and far
        </button>
      </div>
    </>
  );
}

/** What is selected, with exact numbers. */
export function PartCard({ document, planning }: { readonly document: Document; readonly planning: Planning }) {
  const setup = useStore(document, (state) => state.setup);
  const selection = useStore(document, (state) => state.selection);
  const things = thingsById(setup, selection);
  if (things.length === 0) return null;
  const [thing] = things;
  const many = things.length > 1;
  return (
    <section className="card" aria-label="Selected part" key={selection.join(" ")}>
      <header className="card-head">
        <h2>{many ? `${things.length} parts selected` : thingName(thing)}</h2>
        <button
          type="button"
          className="quiet"
          aria-label="Duplicate"
          title="Duplicate (Ctrl+D)"
          onClick={() => document.run(duplicateThings(setup, selection))}
        >
          <Icon name="duplicate" />
        </button>
        <button
          type="button"
          className="quiet"
          aria-label="Take away"
          title="Take away (Delete)"
          onClick={() => document.run(removeThings(setup, selection))}
        >
          <Icon name="remove" />
        </button>
      </header>
      {many ? (
        <ManyTools document={document} setup={setup} ids={selection} />
      ) : (
        <>
          {isPart(thing) && <TextField label="Name" value={thing.name} onSet={(name) => tried(document, setName(setup, thing.id, name))} />}
          {isPart(thing) && <WiringFields document={document} setup={setup} part={thing} />}
          {isPart(thing) && <Reading planning={planning} part={thing} />}
          <h3>Place</h3>
          <div className="pair">
            <NumberField
              label="x"
              unit="mm"
              units={LENGTHS_IN_MM}
              value={thing.xMm}
              step={1}
              onSet={(xMm) => tried(document, placeThing(setup, thing.id, { xMm }))}
            />
            <NumberField
              label="y"
              unit="mm"
              units={LENGTHS_IN_MM}
              value={thing.yMm}
              step={1}
              onSet={(yMm) => tried(document, placeThing(setup, thing.id, { yMm }))}
            />
          </div>
          <NumberField
            label="Turn"
            unit="°"
            units={ANGLES_IN_DEG}
            value={thing.turnDeg}
            step={5}
            onSet={(turnDeg) => tried(document, placeThing(setup, thing.id, { turnDeg }))}
          />
          <h3>Size</h3>
          <SizeFields document={document} thing={thing} />
          {!isPart(thing) && (
            <NumberField
              label="Thickness"
              unit="mm"
              units={LENGTHS_IN_MM}
              value={thing.thicknessMm}
              step={0.5}
              onSet={(thicknessMm) => tried(document, setThickness(thing.id, thicknessMm))}
            />
          )}
        </>
      )}
    </section>
  );
}

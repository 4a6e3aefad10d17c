import { useDeferredValue, useMemo } from "react";
import { useStore } from "zustand";
import { setThickness } from "../document/commands/bench";
import { allLocked, oneGroup, toggleGroup, toggleLock } from "../document/commands/holding";
import { duplicateThings, removeThings, setName } from "../document/commands/parts";
import { placeThing } from "../document/commands/placing";
import type { Document } from "../document/document";
import { isPart, type Thing, thingName, thingsById } from "../document/edit";
import type { Planning } from "../document/planning";
import { texts } from "../texts/texts";
import { CopiesTools } from "./copies-tools";
import { tried } from "./field-surroundings";
import { TextField } from "./fields";
import { IconButton } from "./icon-button";
import { ManyTools } from "./many-tools";
import { NumberField } from "./number-field";
import { PartReading } from "./part-reading";
import { SizeFields } from "./size-fields";
import { RoleFields } from "./wiring-fields";

const words = texts.layOut.part;

function PlaceFields({ document, thing }: { readonly document: Document; readonly thing: Thing }) {
  const { setup } = document.getState();
  const field = (key: "xMm" | "yMm" | "turnDeg", label: string, unit: string, step: number) => (
    <NumberField
      label={label}
      unit={unit}
      value={thing[key]}
      step={step}
      onSet={(value, stepping) => tried(document, placeThing(setup, thing.id, { [key]: value }), stepping)}
    />
  );
  return (
    <>
      <h3>{words.place}</h3>
      <div className="grid-3">
        {field("xMm", "x", "mm", 1)}
        {field("yMm", "y", "mm", 1)}
        {field("turnDeg", words.turn, "°", 5)}
      </div>
    </>
  );
}

function OneThing({ document, planning, thing }: { readonly document: Document; readonly planning: Planning; readonly thing: Thing }) {
  const { setup } = document.getState();
  return (
    <>
      {isPart(thing) && (
        <>
          <TextField label={words.name} value={thing.name} onSet={(name) => tried(document, setName(setup, thing.id, name))} />
          <RoleFields document={document} setup={setup} parts={[thing]} />
          <PartReading planning={planning} part={thing} />
        </>
      )}
      <PlaceFields document={document} thing={thing} />
      <h3>{words.size}</h3>
      <SizeFields document={document} thing={thing} />
      {!isPart(thing) && (
        <NumberField
          label={words.thicknessMm}
          unit="mm"
          value={thing.thicknessMm}
          step={0.5}
          onSet={(thicknessMm, stepping) => tried(document, setThickness(thing.id, thicknessMm), stepping)}
        />
      )}
    </>
  );
}

/** What is selected, with exact numbers. */
export function PartCard({ document, planning }: { readonly document: Document; readonly planning: Planning }) {
  const now = useStore(document, (state) => state.setup);
  const chosen = useStore(document, (state) => state.selection);
  // Under a drag the card's many fields follow when there is time: the hand comes first.
  const { setup, selection } = useDeferredValue(useMemo(() => ({ setup: now, selection: chosen }), [now, chosen]));
  const things = thingsById(setup, selection);
  if (things.length === 0) return null;
  const many = things.length > 1;
  const [locked, grouped] = [allLocked(setup, selection), oneGroup(setup, selection)];
  return (
    <section className="card" aria-label={words.label} key={selection.join(" ")}>
      <header className="card-head">
        <h2>{many ? texts.layOut.many.title(things.length) : thingName(things[0])}</h2>
        {many && (
          <IconButton
            icon="group"
            name={grouped ? words.ungroup : words.group}
            pressed={grouped}
            onPress={() => document.run(toggleGroup(setup, selection))}
          />
        )}
        <IconButton
          icon={locked ? "lock" : "unlock"}
          name={locked ? words.unlock : words.lock}
          pressed={locked}
          onPress={() => document.run(toggleLock(setup, selection))}
        />
        <IconButton
          icon="duplicate"
          name={words.duplicate}
          hint={words.duplicateLong}
          onPress={() => document.run(duplicateThings(setup, selection))}
        />
        <IconButton
          icon="remove"
          name={words.takeAway}
          hint={words.takeAwayLong}
          onPress={() => document.run(removeThings(setup, selection))}
        />
      </header>
      {many && things.some(isPart) && <RoleFields document={document} setup={setup} parts={things.filter(isPart)} />}
      {!many && <OneThing document={document} planning={planning} thing={things[0]} />}
      <ManyTools document={document} setup={setup} ids={selection} />
      <CopiesTools document={document} setup={setup} ids={selection} />
    </section>
  );
}

import { type KeyboardEvent, memo, useId, useState } from "react";
import type { Setup } from "../../shared-types/setup";
import { type Thing, thingsOf } from "../document/edit";
import { toggled } from "../document/holding";
import { texts } from "../texts/texts";
import { describeThing } from "./describe-thing";

const words = texts.canvas.list;

/** One thing; drawn again only when it changes itself, since a drag changes one of many in every frame. */
const Row = memo(function Row(props: {
  readonly id: string;
  readonly thing: Thing;
  readonly supplyVolts: number;
  readonly selected: boolean;
  readonly active: boolean;
  readonly onSelect: (ids: readonly string[]) => void;
}) {
  const { thing } = props;
  return (
    <div
      id={props.id}
      role="option"
      tabIndex={-1}
      aria-selected={props.selected}
      className={props.active ? "active" : undefined}
      onPointerDown={() => props.onSelect([thing.id])}
    >
      {describeThing(thing, props.supplyVolts)}
    </div>
  );
});

/**
 * The tray's contents as a list, for eyes that listen and hands without a pointer. It shares the selection with the canvas, stays
 * out of sight until it has the focus, and hands the focus on to the tray with Enter.
 */
export function PartsList(props: {
  readonly setup: Setup;
  readonly selection: readonly string[];
  readonly onSelect: (ids: readonly string[]) => void;
  /** Enter: on to the tray, where arrow keys move what is selected. */
  readonly onEnter: () => void;
  /** Keys that mean something to the tray too, such as Delete. @returns whether the key was used. */
  readonly onKey: (event: KeyboardEvent) => boolean;
}) {
  const { setup, selection, onSelect } = props;
  const things = thingsOf(setup);
  const prefix = useId();
  const [activeId, setActiveId] = useState<string | null>(null);
  const active = Math.max(
    0,
    things.findIndex(({ id }) => id === (activeId ?? selection[0])),
  );
  const activeThing = things[active];

  function go(to: number, extend: boolean): void {
    const thing = things[Math.min(things.length - 1, Math.max(0, to))];
    if (thing === undefined) return;
    setActiveId(thing.id);
    onSelect(extend ? [...selection.filter((id) => id !== thing.id), thing.id] : [thing.id]);
  }

  function onKeyDown(event: KeyboardEvent): void {
    if (things.length === 0) return;
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step !== undefined) go(active + step, event.shiftKey);
    else if (event.key === "Home") go(0, false);
    else if (event.key === "End") go(things.length - 1, false);
    else if (event.key === "Enter") props.onEnter();
    else if (event.key === " " && activeThing !== undefined) {
      const { id } = activeThing;
      onSelect(toggled(setup, selection, id));
    } else if (!props.onKey(event)) return;
    event.preventDefault();
    event.stopPropagation();
  }

  return (
    <div className="parts-list">
      <p id={`${prefix}-help`}>{words.help}</p>
      {/* One stop for the Tab key; the active option is named by aria-activedescendant. */}
      <div
        role="listbox"
        tabIndex={0}
        aria-label={words.label}
        aria-describedby={`${prefix}-help`}
        aria-multiselectable="true"
        aria-activedescendant={activeThing === undefined ? undefined : `${prefix}-${activeThing.id}`}
        onKeyDown={onKeyDown}
        onFocus={() => setActiveId(selection[0] ?? null)}
      >
        {things.map((thing) => (
          <Row
            key={thing.id}
            id={`${prefix}-${thing.id}`}
            thing={thing}
            supplyVolts={setup.supply.volts}
            selected={selection.includes(thing.id)}
            active={thing === activeThing}
            onSelect={onSelect}
          />
        ))}
        {things.length === 0 && (
          <div role="option" tabIndex={-1} aria-selected="false" aria-disabled="true">
            {words.none}
          </div>
        )}
      </div>
    </div>
  );
}

import { useStore } from "zustand";
import type { CloserLook, Quantity } from "../../document/closer-look";
import type { Document } from "../../document/document";
import { texts } from "../../texts/texts";
import { ChoiceField, choicesOf, Switch } from "../fields";
import { IconButton } from "../icon-button";
import type { WindowStore } from "../window-state";
import { Pins } from "./pins";
import { SectionPart } from "./section";

const words = texts.closer;

export interface CloserCardProps {
  readonly document: Document;
  readonly window: WindowStore;
  readonly closerLook: CloserLook;
  /** What is in hand on the tray. */
  readonly tool: string;
  /** Takes a tool in hand, or puts it away. */
  readonly onTool: (tool: "pin" | "section") => void;
  readonly onCompare: () => void;
}

/** What the colours show, and in which colours. */
function PictureChoices({ closerLook }: Pick<CloserCardProps, "closerLook">) {
  const { quantity, colours, steps, comparison } = useStore(closerLook);
  const choices = choicesOf<Quantity>(words.picture.quantities).filter(([one]) => one !== "difference" || comparison !== null);
  return (
    <section aria-label={words.picture.title}>
      <ChoiceField label={words.picture.of} value={quantity} choices={choices} onSet={(next) => closerLook.look({ quantity: next })} />
      <ChoiceField
        label={words.picture.colours}
        value={colours}
        choices={choicesOf<typeof colours>(words.picture.kinds)}
        onSet={(next) => closerLook.look({ colours: next })}
      />
      <p className="hint">{words.picture.safe}</p>
      <Switch label={words.picture.steps} on={steps} onSet={(next) => closerLook.look({ steps: next })} />
      {(quantity === "field" || quantity === "current") && <p className="hint">{words.picture.openEnd}</p>}
    </section>
  );
}

function Compare({ closerLook, onCompare }: Pick<CloserCardProps, "closerLook" | "onCompare">) {
  const comparison = useStore(closerLook, (state) => state.comparison);
  return (
    <section aria-label={words.compare.title}>
      <h3>{words.compare.title}</h3>
      <p className="hint">{comparison === null ? words.compare.none : words.compare.with(comparison.name)}</p>
      <div className="choices">
        <button type="button" onClick={onCompare}>
          {words.compare.choose}
        </button>
        {comparison !== null && (
          <button type="button" onClick={() => closerLook.compare(null)}>
            {words.compare.end}
          </button>
        )}
      </div>
    </section>
  );
}

/** Reading the field more closely: which picture, pinned probes, a section, another setup beside this one. */
export function CloserCard(props: CloserCardProps) {
  const shown = useStore(props.window, (state) => state.closerShown);
  return shown ? <OpenCloserCard {...props} /> : null;
}

function OpenCloserCard({ document, window, closerLook, tool, onTool, onCompare }: CloserCardProps) {
  const setup = useStore(document, (state) => state.setup);
  const close = (): void => window.set({ closerShown: false });
  return (
    <section className="float-card closer-card" aria-label={words.title} onKeyDown={(event) => event.key === "Escape" && close()}>
      <header className="card-head">
        <h2>{words.title}</h2>
        <IconButton icon="close" name={words.close} onPress={close} />
      </header>
      <PictureChoices closerLook={closerLook} />
      <Pins setup={setup} closerLook={closerLook} placing={tool === "pin"} onPlacing={() => onTool("pin")} />
      <SectionPart setup={setup} closerLook={closerLook} drawing={tool === "section"} onDrawing={() => onTool("section")} />
      <Compare closerLook={closerLook} onCompare={onCompare} />
    </section>
  );
}

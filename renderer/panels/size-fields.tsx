import type { Shape } from "../../shared-types/setup";
import { resizeThing } from "../document/commands/placing";
import type { Document } from "../document/document";
import type { Thing } from "../document/edit";
import { texts } from "../texts/texts";
import { tried } from "./field-surroundings";
import { IconButton } from "./icon-button";
import { NumberField } from "./number-field";

const words = texts.layOut.part;
const sizeName = (key: string): string => Object.entries(words.sizes).find(([name]) => name === key)?.[1] ?? key;

type Polygon = Extract<Shape, { kind: "polygon" }>;
type Corner = Polygon["pointsMm"][number];

/** A corner halfway to the next one, so that the outline stays as it was. */
function withCornerAfter(points: readonly Corner[], index: number): readonly Corner[] {
  const [x0, y0] = points[index];
  const [x1, y1] = points[(index + 1) % points.length];
  return [...points.slice(0, index + 1), [(x0 + x1) / 2, (y0 + y1) / 2], ...points.slice(index + 1)];
}

function CornerFields({ document, thing, shape }: { readonly document: Document; readonly thing: Thing; readonly shape: Polygon }) {
  const { pointsMm } = shape;
  const set = (points: readonly Corner[], stepping = false) =>
    tried(document, resizeThing(document.getState().setup, thing.id, { kind: "polygon", pointsMm: points }), stepping);
  return (
    <>
      <p className="hint">{words.corners}</p>
      <ol className="corners">
        {pointsMm.map(([x, y], index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: a corner is its place in the list
          <li key={index}>
            <NumberField
              bare
              label={words.corner("x", index + 1)}
              unit="mm"
              value={x}
              step={1}
              onSet={(next, stepping) => set(pointsMm.with(index, [next, y]), stepping)}
            />
            <NumberField
              bare
              label={words.corner("y", index + 1)}
              unit="mm"
              value={y}
              step={1}
              onSet={(next, stepping) => set(pointsMm.with(index, [x, next]), stepping)}
            />
            <IconButton icon="add" name={words.addCorner(index + 1)} onPress={() => set(withCornerAfter(pointsMm, index))} />
            <IconButton
              icon="close"
              name={words.dropCorner(index + 1)}
              disabled={pointsMm.length <= 3}
              onPress={() => set(pointsMm.filter((_, other) => other !== index))}
            />
          </li>
        ))}
      </ol>
    </>
  );
}

/** The sizes of a shape, each a field; the corners of a polygon. */
export function SizeFields({ document, thing }: { readonly document: Document; readonly thing: Thing }) {
  const { shape } = thing;
  if (shape.kind === "polygon") return <CornerFields document={document} thing={thing} shape={shape} />;
  return (
    <div className="grid-2">
      {Object.entries(shape)
        .filter(([key]) => key !== "kind")
        .map(([key, value]) => (
          <NumberField
            key={key}
            label={sizeName(key)}
            unit={key === "sweepDeg" ? "°" : "mm"}
            value={Number(value)}
            step={key === "sweepDeg" ? 5 : 1}
            onSet={(size, stepping) =>
              tried(document, resizeThing(document.getState().setup, thing.id, { ...shape, [key]: size } as Shape), stepping)
            }
          />
        ))}
    </div>
  );
}

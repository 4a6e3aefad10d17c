import type { Setup } from "../../shared-types/setup";
import { moveToGap } from "../document/commands/gap";
import { type AlignTo, alignThings, distributeThings, mirrorThings } from "../document/commands/placing";
import type { Document } from "../document/document";
import { type BoxMm, type Thing, thingName, thingsById } from "../document/edit";
import { gapMm } from "../engine/geometry/clearance";
import { boundsOf, outlineOf } from "../engine/geometry/outline";
import { outlined } from "../engine/geometry/overlap";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { texts } from "../texts/texts";
import { tried } from "./field-surroundings";
import { IconButton } from "./icon-button";
import type { IconName } from "./icons";
import { NumberField } from "./number-field";

const words = texts.layOut.many;

export const boxOf = (thing: Thing): BoxMm => boundsOf(outlineOf(thing));
const gapOf = (a: Thing, b: Thing): number => gapMm(outlined(a), outlined(b));

const ALIGNMENTS: readonly (readonly [AlignTo, IconName])[] = [
  ["left", "align-left"],
  ["centre", "align-centre"],
  ["right", "align-right"],
  ["top", "align-top"],
  ["middle", "align-middle"],
  ["bottom", "align-bottom"],
];

export interface ToolsProps {
  readonly document: Document;
  readonly setup: Setup;
  readonly ids: readonly string[];
}

/** Lining up, spacing, mirroring, and the exact gap between two; a single part lines up in the tray. */
export function ManyTools({ document, setup, ids }: ToolsProps) {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const things = thingsById(setup, ids);
  const single = things.length === 1;
  const [fixed, moving] = ids.flatMap((id) => things.filter((thing) => thing.id === id));
  return (
    <>
      {things.length === 2 && (
        <>
          <NumberField
            label={words.gap}
            unit="mm"
            value={Number(gapOf(fixed, moving).toFixed(3))}
            step={1}
            onSet={(wantedMm, stepping) => {
              const before = document.getState().setup;
              const problems = tried(document, moveToGap(before, moving.id, fixed.id, wantedMm, gapOf), stepping);
              if (problems.length > 0) return problems;
              const [a, b] = thingsById(document.getState().setup, ids);
              return Math.abs(gapOf(a, b) - wantedMm) < 0.1 ? [] : [{ where: "", message: words.gapRefused }];
            }}
          />
          <p className="hint">{words.gapUnknown(thingName(moving))}</p>
        </>
      )}
      <h3>{single ? words.alignTray : words.align}</h3>
      <div className="tools">
        {ALIGNMENTS.map(([to, icon]) => (
          <IconButton
            key={to}
            icon={icon}
            name={words.alignTo[to]}
            onPress={() => document.run(alignThings(setup, ids, to, boxOf, [0, 0, lengthMm, widthMm]))}
          />
        ))}
        {!single && (
          <>
            <span className="tools-gap" />
            <IconButton
              icon="space-x"
              name={words.spaceX}
              disabled={things.length < 3}
              onPress={() => document.run(distributeThings(setup, ids, "x", boxOf))}
            />
            <IconButton
              icon="space-y"
              name={words.spaceY}
              disabled={things.length < 3}
              onPress={() => document.run(distributeThings(setup, ids, "y", boxOf))}
            />
          </>
        )}
        <span className="tools-gap" />
        <IconButton
          icon="mirror-x"
          name={`${words.mirror}: ${words.mirrorX}`}
          onPress={() => document.run(mirrorThings(setup, ids, "left-right", boxOf))}
        />
        <IconButton
          icon="mirror-y"
          name={`${words.mirror}: ${words.mirrorY}`}
          onPress={() => document.run(mirrorThings(setup, ids, "top-bottom", boxOf))}
        />
      </div>
    </>
  );
}

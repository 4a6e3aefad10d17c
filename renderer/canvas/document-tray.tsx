import { useEffect, useMemo, useState } from "react";
import { useStore } from "zustand";
import type { Finding } from "../../shared-types/plan";
import type { JudgedRun } from "../../shared-types/readings";
import type { Setup } from "../../shared-types/setup";
import type { CloserLook } from "../document/closer-look";
import type { Document } from "../document/document";
import { LOCKED } from "../document/holding";
import type { Planning } from "../document/planning";
import { announcement } from "./announcement";
import { createReadout, type PointerReadout, type SampleSource } from "./readout";
import type { CanvasTheme } from "./theme";
import { TrayCanvas } from "./tray-canvas";
import type { PlannedField, Shown } from "./use-paints";
import type { Place, TrayView } from "./view";

/** Without these the old field says nothing about the tray any more; after an overlap it still shows, pale, where things were. */
const PALE_CODES: ReadonlySet<string> = new Set(["overlap", "short-circuit"]);
const NO_FINDINGS: readonly Finding[] = [];
const NO_POINTS: ReadonlySet<number> = new Set();

/** An edit shares what it leaves alone; a setup that was opened shares nothing with the one before, and its old field says nothing of it. */
const sameBench = (a: Setup, b: Setup): boolean => a.tray === b.tray || a.water === b.water;
const opened = (planned: Setup, now: Setup): boolean =>
  planned.tray !== now.tray && planned.water !== now.water && planned.supply !== now.supply && planned.meter !== now.meter;

/** The canvas of the open document: follows the document and its plan, announces changes, reads the field under the pointer. */
export function DocumentTray(props: {
  readonly document: Document;
  readonly planning: Planning;
  readonly client: SampleSource;
  readonly trayView: TrayView;
  readonly theme: CanvasTheme;
  readonly shown: Shown;
  readonly closerLook: CloserLook;
  readonly markedPoints?: ReadonlySet<number>;
  readonly judged?: JudgedRun | null;
  readonly editable?: boolean;
  readonly onReadout: (readout: PointerReadout | null) => void;
}) {
  const { document, planning, client, onReadout } = props;
  const setup = useStore(document, (state) => state.setup);
  const closer = useStore(props.closerLook);
  const selection = useStore(document, (state) => state.selection);
  const held = useStore(document, (state) => state.refused.find(({ where }) => where === LOCKED));
  const snapping = useStore(document, (state) => state.snapping);
  const plan = useStore(planning, (state) => state.plan);
  const plannedSetup = useStore(planning, (state) => state.plannedSetup);
  const refusal = useStore(planning, (state) => state.refusal);

  const field = useMemo((): PlannedField | null => {
    if (plan === null || plannedSetup === null) return null;
    if (opened(plannedSetup, setup)) return null;
    if (refusal !== null && !PALE_CODES.has(refusal.code)) return null;
    return { plan, setup: plannedSetup, outOfDate: refusal !== null || !sameBench(plannedSetup, setup) };
  }, [plan, plannedSetup, refusal, setup]);

  const readout = useMemo(() => createReadout(client, onReadout), [client, onReadout]);
  const [pointer, setPointer] = useState<Place | null>(null);
  useEffect(() => {
    // Also when the plan changes under a resting pointer.
    if (pointer === null) readout.leave();
    else readout.at(plan === null || refusal !== null ? null : plannedSetup, pointer);
  }, [readout, pointer, plan, plannedSetup, refusal]);

  return (
    <>
      <TrayCanvas
        setup={setup}
        selection={selection}
        snapping={snapping}
        field={field}
        findings={refusal?.findings ?? plan?.findings ?? NO_FINDINGS}
        trayView={props.trayView}
        theme={props.theme}
        shown={props.shown}
        closer={closer}
        closerActions={props.closerLook}
        markedPoints={props.markedPoints ?? NO_POINTS}
        judged={props.judged ?? null}
        editable={props.editable ?? true}
        actions={document}
        onPointer={setPointer}
      />
      {held !== undefined && <p className="tray-refusal">{held.message}</p>}
      <Announcements document={document} planning={planning} />
    </>
  );
}

/** Says aloud what changed, for those who cannot see it. */
function Announcements({ document, planning }: { readonly document: Document; readonly planning: Planning }) {
  const [said, setSaid] = useState("");
  useEffect(
    () =>
      document.subscribe((now, before) => {
        const sentence = announcement(now, before);
        if (sentence !== null) setSaid(sentence);
      }),
    [document],
  );
  const refusal = useStore(planning, (state) => state.refusal);
  return (
    <div className="unseen">
      <p role="status">{said}</p>
      <p role="alert">{refusal?.message ?? ""}</p>
    </div>
  );
}

import { useStore } from "zustand";
import type { ReadingRun } from "../../../shared-types/readings";
import { addRun, clearRun, describeRun, freshRunId, removeRun, runsOf } from "../../document/commands/readings";
import type { Document } from "../../document/document";
import type { Planning } from "../../document/planning";
import { texts } from "../../texts/texts";
import { tried } from "../field-surroundings";
import { TextField } from "../fields";
import type { WindowStore } from "../window-state";
import { shownRun, todayIso } from "./readings-check";

const words = texts.readings.runs;

/** Adds a run and shows it. @returns its id. */
export function beginRun(document: Document, window: WindowStore): string {
  const { setup } = document.getState();
  const id = freshRunId(setup);
  document.run(addRun(id, words.tray(Number(id.replace("run-", ""))), todayIso(new Date())));
  window.set({ run: id });
  return id;
}

/** Who took the shown run and when, and how to be rid of it. */
function RunFields({ document, run }: { readonly document: Document; readonly run: ReadingRun }) {
  return (
    <>
      {(["name", "takenBy", "takenOn"] as const).map((key) => (
        <TextField
          key={key}
          label={words[key]}
          value={run[key]}
          onSet={(value) => tried(document, describeRun(run.id, { [key]: value.trim() }))}
        />
      ))}
      <div className="choices">
        <button
          type="button"
          disabled={run.readings.length + run.found.length === 0}
          onClick={() => document.run(clearRun(run.id, run.name))}
        >
          {words.clear}
        </button>
        <button type="button" onClick={() => document.run(removeRun(run.id, run.name))}>
          {words.remove}
        </button>
      </div>
    </>
  );
}

/** The runs of readings in this setup. */
export function RunsCard(props: { readonly document: Document; readonly planning: Planning; readonly window: WindowStore }) {
  const { document, planning, window } = props;
  const setup = useStore(document, (state) => state.setup);
  const chosen = useStore(window, (state) => state.run);
  const setupId = useStore(planning, (state) => state.plan?.setupId ?? null);
  const runs = runsOf(setup);
  const run = shownRun(setup, chosen);
  const isOld = run !== null && setupId !== null && run.setupId !== "" && run.setupId !== setupId;
  return (
    <section className="readings-runs" aria-label={words.title}>
      <h2>{words.title}</h2>
      {runs.length === 0 && <p className="hint">{words.none}</p>}
      <ul>
        {runs.map(({ id, name, readings, found }) => (
          <li key={id}>
            <button type="button" className="in-tray" aria-pressed={id === run?.id} onClick={() => window.set({ run: id })}>
              <span className="in-tray-name" title={name}>
                {name === "" ? id : name}
              </span>
              <span className="in-tray-standing">{words.read(readings.length + found.length)}</span>
            </button>
          </li>
        ))}
      </ul>
      <button type="button" onClick={() => beginRun(document, window)}>
        {words.add}
      </button>
      {run !== null && <RunFields key={run.id} document={document} run={run} />}
      {isOld && <p className="hint">{words.otherLayout(run.setupId, setupId)}</p>}
    </section>
  );
}

import type { ReactNode } from "react";
import { useStore } from "zustand";
import type { Document } from "../document/document";
import type { Planning } from "../document/planning";
import { BenchDesk } from "./bench/bench-desk";
import type { Files } from "./files";
import { KeysCard } from "./keys-card";
import { Ledger } from "./ledger";
import { Messages } from "./messages";
import { PartCard } from "./part-card";
import { ProbePanel } from "./probe-panel";
import { Shelf } from "./shelf";
import { Rail, TopBar, type TopBarProps } from "./top-bar";
import { ShownCard, TrayCard } from "./tray-card";
import type { WindowStore } from "./window-state";

export interface ShellProps extends Omit<TopBarProps, "files"> {
  readonly document: Document;
  readonly planning: Planning;
  readonly window: WindowStore;
  readonly files: Files;
  /** The tray with its zoom buttons; stays mounted while desks change beside it. */
  readonly tray: ReactNode;
  readonly sheets: ReactNode;
  readonly startPage: ReactNode;
}

/** The window: rail, top bar, ledger, and the desk's cards round the tray. */
export function Shell(props: ShellProps) {
  const { document, planning, window } = props;
  const { desk, startPage } = useStore(window);
  const selected = useStore(document, (state) => state.selection.length > 0);
  const fault = useStore(planning, (state) => state.fault);
  return (
    <div className={`shell desk-${startPage ? "start" : desk}`}>
      <Rail window={window} />
      <TopBar {...props} />
      {startPage && props.startPage}
      {!startPage && desk === "sheets" && props.sheets}
      {!startPage && desk !== "sheets" && (
        <>
          {desk === "lay-out" && (
            <aside className="left">
              <Shelf document={document} />
            </aside>
          )}
          <main className="tray-place" aria-label="Tray">
            {props.tray}
          </main>
          <aside className="side" aria-label={desk === "bench" ? "Bench" : desk === "probe-plan" ? "Probe plan" : "Part and tray"}>
            {desk === "lay-out" && (
              <>
                {selected ? <PartCard document={document} planning={planning} /> : <TrayCard document={document} />}
                <ShownCard document={document} window={window} />
              </>
            )}
            {desk === "bench" && <BenchDesk document={document} planning={planning} />}
            {desk === "probe-plan" && <ProbePanel document={document} planning={planning} window={window} />}
          </aside>
        </>
      )}
      <Ledger document={document} planning={planning} window={window} />
      <KeysCard window={window} />
      <Messages window={window} />
      {fault !== null && (
        <section className="message message-problem fault" role="alertdialog" aria-label="The field could not be solved">
          <h2>The field could not be solved</h2>
          <p>{fault}</p>
          <div className="choices">
            <button type="button" onClick={planning.retry}>
              Try again
            </button>
          </div>
        </section>
      )}
    </div>
  );
}

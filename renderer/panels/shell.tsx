import type { ReactNode } from "react";
import { useStore } from "zustand";
import type { Host, Settings } from "../../shared-types/host";
import type { Document } from "../document/document";
import type { Planning } from "../document/planning";
import { texts } from "../texts/texts";
import type { DrawsClient } from "../worker/draws-client";
import { BenchDesk } from "./bench/bench-desk";
import type { Act } from "./commands";
import { FaultCard, FaultGuard } from "./fault-card";
import type { Files } from "./files";
import { KeysCard } from "./keys-card";
import { Ledger } from "./ledger";
import { Messages } from "./messages";
import { PartCard } from "./part-card";
import { PartsInTray } from "./parts-in-tray";
import { ProbePanel, ProbeSettings } from "./probe-panel";
import { SettingsCard } from "./settings-card";
import { Shelf } from "./shelf";
import { StockShelf } from "./stock/stock-shelf";
import type { StockKeeper } from "./stock/use-stock";
import { StatedTolerances } from "./tolerance/stated-tolerances";
import { Rail, TopBar } from "./top-bar";
import { SupplyCard, TrayCard, WaterCard } from "./tray-card";
import type { WindowStore } from "./window-state";

const words = texts.window;

export interface ShellProps {
  readonly host: Host;
  readonly document: Document;
  readonly planning: Planning;
  readonly draws: DrawsClient;
  readonly window: WindowStore;
  readonly files: Files;
  readonly settings: Settings;
  readonly onSettings: (change: Partial<Settings>) => void;
  readonly onTheme: () => void;
  readonly onPrint: () => void;
  readonly onSaveTable: () => void;
  readonly act: Act;
  /** The tray with its view bar; it stays mounted, and where it is, while desks change beside it. */
  readonly tray: ReactNode;
  readonly sheets: ReactNode;
  /** What the Readings desk shows left and right of the tray. */
  readonly readings: { readonly runs: ReactNode; readonly table: ReactNode };
  readonly startPage: ReactNode;
  /** The card of the closer look, shown over the desk's cards. */
  readonly closer: ReactNode;
  readonly keeper: StockKeeper;
  /** The card of the stock list. */
  readonly stockCard: ReactNode;
}

/** The cards of laying out: those of the selected parts, else those of the tray. */
function LayOutCards({ document, planning }: Pick<ShellProps, "document" | "planning">) {
  const selected = useStore(document, (state) => state.selection.length > 0);
  if (selected) return <PartCard document={document} planning={planning} />;
  return (
    <>
      <TrayCard document={document} />
      <WaterCard document={document} />
      <SupplyCard document={document} />
    </>
  );
}

/** What stands left and right of the tray on the desks that show it. */
function TrayDesk(props: ShellProps & { readonly desk: "lay-out" | "bench" | "probe-plan" | "readings" }) {
  const { host, document, planning, window, desk } = props;
  const partWords = texts.layOut.parts;
  return (
    <>
      <aside className="left" aria-label={texts.layOut.parts.title}>
        {desk === "lay-out" && <Shelf document={document} />}
        {desk === "probe-plan" && <ProbeSettings document={document} />}
        {desk === "probe-plan" && <StatedTolerances document={document} />}
        {desk === "readings" && props.readings.runs}
        <PartsInTray document={document} none={desk === "lay-out" ? partWords.none : partWords.noneElsewhere} />
        {desk === "lay-out" && (
          <StockShelf
            document={document}
            keeper={props.keeper}
            onEdit={() => window.set({ stockShown: true, closerShown: false, settingsShown: false, keysShown: false })}
          />
        )}
      </aside>
      <main className="tray-place" aria-label={words.tray}>
        {props.tray}
      </main>
      <aside className="side" aria-label={words.sides[desk]}>
        <FaultGuard key={desk} host={host}>
          {desk === "lay-out" && <LayOutCards document={document} planning={planning} />}
          {desk === "bench" && <BenchDesk document={document} planning={planning} />}
          {desk === "probe-plan" && (
            <ProbePanel document={document} draws={props.draws} planning={planning} window={window} onSaveTable={props.onSaveTable} />
          )}
          {desk === "readings" && props.readings.table}
        </FaultGuard>
      </aside>
    </>
  );
}

/** The window: rail, top bar, ledger, and the desk's cards round the tray. */
export function Shell(props: ShellProps) {
  const { host, document, planning, window, settings } = props;
  const desk = useStore(window, (state) => state.desk);
  const startPage = useStore(window, (state) => state.startPage);
  const fault = useStore(planning, (state) => state.fault);
  return (
    <div className={`shell desk-${startPage ? "start" : desk}`}>
      <Rail window={window} />
      <TopBar {...props} theme={settings.theme} />
      {startPage && props.startPage}
      {!startPage && desk === "sheets" && <FaultGuard host={host}>{props.sheets}</FaultGuard>}
      {!startPage && desk !== "sheets" && <TrayDesk {...props} desk={desk} />}
      <Ledger document={document} planning={planning} window={window} stock={props.keeper.stock} />
      <KeysCard window={window} act={props.act} />
      {!startPage && desk !== "sheets" && props.closer}
      {!startPage && desk === "lay-out" && props.stockCard}
      <SettingsCard window={window} settings={settings} onSettings={props.onSettings} />
      <Messages host={host} window={window} />
      {fault !== null && <FaultCard host={host} title={words.fault.field} message={fault} onAgain={planning.retry} />}
    </div>
  );
}

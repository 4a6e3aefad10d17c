import "./styles/tokens.css";
import "./styles/window.css";
import "./styles/fields.css";
import "./styles/desks.css";
import "./styles/page-strip.css";
import "./styles/closer-look.css";
import "./styles/readings.css";
import "./canvas/canvas.css";
import { useEffect, useMemo, useRef, useState } from "react";
import { useStore } from "zustand";
import type { Host } from "../shared-types/host";
import type { PlanOutcome } from "../shared-types/plan";
import type { Setup } from "../shared-types/setup";
import { canvasPicture } from "./canvas/canvas-picture";
import { DocumentTray } from "./canvas/document-tray";
import { canvasTheme } from "./canvas/theme";
import { createTrayView } from "./canvas/view";
import { diagnoseAside } from "./diagnosis-source";
import { createCloserLook } from "./document/closer-look";
import { createDocument } from "./document/document";
import { createPlanning } from "./document/planning";
import { probeTableCsv } from "./engine/probing/probe-table-csv";
import { judgeRun, pointsOf } from "./engine/readings/judge";
import { readTable } from "./engine/readings/read-table";
import { foundPlacesCsv, readingsCsv } from "./engine/readings/write-table";
import { EXAMPLES } from "./examples/all-examples";
import { saltmarshStock } from "./examples/saltmarsh-stock";
import { CloserCard } from "./panels/closer-look/closer-card";
import { compareWithFile } from "./panels/closer-look/compare";
import { useKeptColours } from "./panels/closer-look/use-kept-colours";
import { commandsOf } from "./panels/commands";
import { FieldContext } from "./panels/field-surroundings";
import { emptyTray, filesOf } from "./panels/files";
import { handOverOf } from "./panels/hand-over";
import { printPlanOf } from "./panels/print-plan";
import type { ReadingsCheck } from "./panels/readings/readings-check";
import { ReadingsDesk } from "./panels/readings/readings-desk";
import { RunsCard } from "./panels/readings/runs-card";
import { FIRST_CHOICE, type SheetSource, sheetChoiceOf } from "./panels/sheet-choice";
import { SheetsDesk } from "./panels/sheets-desk";
import { Shell } from "./panels/shell";
import { StartPage } from "./panels/start-page";
import { StockCard } from "./panels/stock/stock-card";
import { exportStock, importStock, useStock } from "./panels/stock/use-stock";
import { useDrafts, useFaultMessages, useHostEvents, useWindowTitle } from "./panels/use-host-events";
import { useRecentPictures, useSettings } from "./panels/use-settings";
import { THEMES, useTheme } from "./panels/use-theme";
import { ViewBar } from "./panels/view-bar";
import { createWindowStore } from "./panels/window-state";
import { createDrawsClient } from "./worker/draws-client";
import { createFieldClient } from "./worker/field-client";

/** The composition of the window: who is made, and who is handed to whom. */

const startWorker = (): Worker => new Worker(new URL("./worker/field-worker.ts", import.meta.url), { type: "module" });

/** Plans another setup in a worker of its own, which then goes: the open setup's planning is not disturbed. */
async function planAside(setup: Setup): Promise<PlanOutcome | null> {
  const aside = createFieldClient(startWorker);
  try {
    return await aside.plan(setup, "print");
  } finally {
    aside.close();
  }
}

/** What the Readings desk knows of the engine. */
const READINGS_CHECK: ReadingsCheck = {
  pointsOf,
  judge: judgeRun,
  readTable,
  readingsCsv,
  foundPlacesCsv,
  diagnose: (...asked) => diagnoseAside(() => createFieldClient(startWorker), ...asked),
};

/** The sheets and jsPDF are loaded when they are first asked for. */
const loadSheets = async (): Promise<SheetSource> => (await import("./sheet-source")).createSheetSource();

const startDrawWorker = (): Worker => new Worker(new URL("./worker/draw-worker.ts", import.meta.url), { type: "module" });

function made(host: Host) {
  const client = createFieldClient(startWorker);
  const document = createDocument(EXAMPLES[1]?.setup ?? emptyTray());
  const window = createWindowStore();
  const planning = createPlanning(document, client);
  return {
    client,
    document,
    window,
    planning,
    draws: createDrawsClient(startDrawWorker, navigator.hardwareConcurrency || 1, () => performance.now()),
    closerLook: createCloserLook(planning, client),
    files: filesOf(host, document, window),
    trayView: createTrayView(document.getState().setup.tray),
  };
}

export function App({ host }: { readonly host: Host }) {
  const { client, document, window, planning, draws, closerLook, files, trayView } = useMemo(() => made(host), [host]);
  const [settings, changeSettings] = useSettings(host);
  useKeptColours(closerLook, settings, changeSettings);
  const keeper = useStock(settings, changeSettings);
  const [choice, setChoice] = useState(FIRST_CHOICE);
  const toPrint = useRef(sheetChoiceOf(choice, settings));
  toPrint.current = sheetChoiceOf(choice, settings);
  const shown = useStore(window, (state) => state.shown);
  const markedPoints = useStore(window, (state) => state.markedPoints);
  const judged = useStore(window, (state) => state.judged);
  const tool = useStore(trayView, (state) => state.tool);
  const dark = useTheme(settings);
  const theme = useMemo(() => {
    const style = getComputedStyle(globalThis.document.documentElement);
    return canvasTheme(dark, (property) => style.getPropertyValue(property));
  }, [dark]);

  const handOver = useMemo(() => {
    return handOverOf(
      host,
      window,
      () => printPlanOf(document, planning),
      () => toPrint.current,
      loadSheets,
      (plan) => probeTableCsv(plan.probing, plan.bench.meter.digitVolts),
      { png: () => canvasPicture(globalThis.document), title: () => document.getState().setup.title },
    );
  }, [host, window, document, planning]);
  const act = useMemo(
    () =>
      commandsOf({
        host,
        document,
        window,
        files,
        trayView,
        save: () => void handOver.savePdf(),
        print: () => void handOver.print(),
      }),
    [host, document, window, files, trayView, handOver],
  );
  useHostEvents(host, window, files, act);
  useDrafts(host, document, window, files);
  useWindowTitle(host, document);
  useFaultMessages(host, window);
  useRecentPictures(document, settings, changeSettings);
  useEffect(() => document.subscribe(({ setup }) => trayView.showTray(setup.tray)), [document, trayView]);
  const fields = useMemo(() => ({ lengthUnit: settings.lengthUnit, onStepsEnd: document.settle }), [settings.lengthUnit, document]);

  return (
    <FieldContext value={fields}>
      <Shell
        host={host}
        document={document}
        planning={planning}
        draws={draws}
        window={window}
        files={files}
        settings={settings}
        onSettings={changeSettings}
        onTheme={() => changeSettings({ theme: THEMES[(THEMES.indexOf(settings.theme) + 1) % THEMES.length] })}
        onPrint={() => void handOver.print()}
        onSaveTable={() => void handOver.saveTable()}
        act={act}
        tray={
          <>
            <DocumentTray
              document={document}
              planning={planning}
              client={client}
              trayView={trayView}
              theme={theme}
              shown={shown}
              closerLook={closerLook}
              markedPoints={markedPoints}
              judged={judged}
              onReadout={(readout) => window.set({ readout })}
            />
            <ViewBar
              document={document}
              window={window}
              zoom={trayView}
              tapeOut={tool === "tape"}
              onSavePicture={() => void handOver.savePicture()}
              onTape={() => trayView.setTool(tool === "tape" ? "hand" : "tape")}
            />
          </>
        }
        keeper={keeper}
        stockCard={
          <StockCard
            document={document}
            window={window}
            keeper={keeper}
            example={saltmarshStock}
            onImport={() => void importStock(host, window, keeper.keep)}
            onExport={() => void exportStock(host, window, keeper.stock)}
          />
        }
        closer={
          <CloserCard
            document={document}
            window={window}
            closerLook={closerLook}
            tool={tool}
            onTool={(next) => trayView.setTool(trayView.getState().tool === next ? "hand" : next)}
            onCompare={() => void compareWithFile(host, window, closerLook, planAside)}
          />
        }
        readings={{
          runs: <RunsCard document={document} planning={planning} window={window} />,
          table: <ReadingsDesk host={host} document={document} planning={planning} window={window} check={READINGS_CHECK} />,
        }}
        startPage={
          <StartPage host={host} files={files} examples={EXAMPLES} settings={settings} onBack={() => window.set({ startPage: false })} />
        }
        sheets={
          <SheetsDesk
            document={document}
            planning={planning}
            loadSheets={loadSheets}
            choice={choice}
            onChoice={setChoice}
            settings={settings}
            onSettings={changeSettings}
            onSave={() => void handOver.savePdf()}
            onPrint={() => void handOver.print()}
            onSaveDrawing={(kind) => void handOver.saveDrawing(kind)}
          />
        }
      />
    </FieldContext>
  );
}

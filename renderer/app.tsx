import "./styles/tokens.css";
import "./styles/window.css";
import "./canvas/canvas.css";
import { useCallback, useEffect, useMemo, useState } from "react";
import { useStore } from "zustand";
import type { Host, HostEvent, Settings } from "../shared-types/host";
import { settingsSchema } from "../shared-types/host";
import { DocumentTray } from "./canvas/document-tray";
import { canvasTheme } from "./canvas/theme";
import { createTrayView } from "./canvas/view";
import { keepDraft } from "./document/autosave";
import { createDocument, isDirty } from "./document/document";
import { createPlanning } from "./document/planning";
import { EXAMPLES } from "./examples/all-examples";
import { type Act, actOnKey, commandsOf } from "./panels/commands";
import { emptyTray, filesOf } from "./panels/files";
import { type SheetChoice, type SheetSource, SheetsDesk } from "./panels/sheets-desk";
import { Shell } from "./panels/shell";
import { StartPage } from "./panels/start-page";
import { IconButton } from "./panels/top-bar";
import { createWindowStore } from "./panels/window-state";
import { createFieldClient } from "./worker/field-client";

/** The composition of the window: who is made, and who is handed to whom. */

const startWorker = (): Worker => new Worker(new URL("./worker/field-worker.ts", import.meta.url), { type: "module" });

/** The sheets and jsPDF are loaded when they are first asked for. */
const loadSheets = async (): Promise<SheetSource> => (await import("./sheet-source")).createSheetSource();

const FIRST_CHOICE: SheetChoice = {
  pages: ["template", "probe-table"],
  paper: "a4",
  withPoints: true,
  saveInk: false,
  mirrored: false,
  printerScale: [1, 1],
};

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
    files: filesOf(host, document, window),
    trayView: createTrayView(document.getState().setup.tray),
  };
}

const THEMES = ["system", "light", "dark", "contrast"] as const;
const prefersDark = (): MediaQueryList => matchMedia("(prefers-color-scheme: dark)");

/** Puts the chosen colours on the page. @returns whether they are dark. */
function useTheme(theme: Settings["theme"]): boolean {
  const [systemDark, setSystemDark] = useState(prefersDark().matches);
  useEffect(() => {
    const query = prefersDark();
    const follow = (): void => setSystemDark(query.matches);
    query.addEventListener("change", follow);
    return () => query.removeEventListener("change", follow);
  }, []);
  const dark = theme === "dark" || (theme === "system" && systemDark);
  const root = globalThis.document.documentElement;
  root.dataset.theme = dark ? "dark" : "light";
  root.dataset.contrast = theme === "contrast" ? "more" : "normal";
  return dark;
}

export function App({ host }: { readonly host: Host }) {
  const parts = useMemo(() => made(host), [host]);
  const { client, document, window, planning, files, trayView } = parts;
  const [settings, setSettings] = useState<Settings>(settingsSchema.parse({}));
  const [choice, setChoice] = useState(FIRST_CHOICE);
  const shown = useStore(window, (state) => state.shown);
  const markedPoints = useStore(window, (state) => state.markedPoints);
  const dark = useTheme(settings.theme);
  const theme = useMemo(() => {
    const style = getComputedStyle(globalThis.document.documentElement);
    return canvasTheme(dark, (property) => style.getPropertyValue(property));
  }, [dark]);

  const makePdf = useCallback(async () => {
    const { setup } = document.getState();
    const { plan, plannedSetup } = planning.getState();
    if (plan === null || plannedSetup !== setup) return null;
    return { title: setup.title === "" ? "Tray" : setup.title, bytes: await (await loadSheets()).pdf(setup, plan, choice) };
  }, [document, planning, choice]);
  const hand = useCallback(
    async (to: "file" | "printer") => {
      try {
        const pdf = await makePdf();
        if (pdf === null) {
          window.tell({
            tone: "problem",
            title: "There is nothing to print yet",
            lines: ["The sheets come with the field of this tray."],
            choices: [],
          });
          return;
        }
        const outcome =
          to === "file"
            ? await host.exportFile({ suggestedName: `${pdf.title}.pdf`, kind: "pdf", bytes: pdf.bytes })
            : await host.printPdf(pdf);
        if (outcome.kind === "failed")
          window.tell({ tone: "problem", title: "The sheets were not handed over", lines: [outcome.message], choices: [] });
        else if (outcome.kind === "saved")
          window.tell({ tone: "done", title: `Saved ${outcome.name}`, lines: ["Print at 100 % and measure the check bars."], choices: [] });
      } catch (error) {
        window.tell({ tone: "problem", title: "The sheets could not be made", lines: [String(error)], choices: [] });
      }
    },
    [makePdf, host, window],
  );

  const act: Act = useMemo(
    () => commandsOf({ host, document, window, files, trayView, save: () => void hand("file"), print: () => void hand("printer") }),
    [host, document, window, files, trayView, hand],
  );

  useEffect(() => {
    const take = (event: HostEvent): void => {
      if (event.kind === "command") act(event.command);
      else if (event.kind === "file-arrived") files.take(event.file, event.text);
      else if (event.kind === "file-refused")
        window.tell({ tone: "problem", title: "The file was not opened", lines: [event.message], choices: [] });
      else if (event.kind === "save-and-close") void files.save().then((saved) => saved && host.closeWindow());
      else
        window.tell({
          tone: "question",
          title: event.gone ? `${event.file.name} was taken away by another program` : `${event.file.name} was changed by another program`,
          lines: ["What is open here is unchanged."],
          choices: event.gone ? [] : [{ label: "Read it again", choose: () => void files.openRecent(event.file.handle) }],
        });
    };
    return host.listen(take);
  }, [host, act, files, window]);

  useEffect(() => {
    host.keptDrafts().then(
      (drafts) => {
        if (drafts.length > 0) window.tell(files.offerKept(drafts[0], drafts.length));
      },
      () => {},
    );
  }, [host, window, files]);
  useEffect(() => {
    host.readSettings().then(setSettings, () => {});
  }, [host]);
  useEffect(() => {
    const stop = keepDraft(document, host, (reason) =>
      window.tell({ tone: "problem", title: "Your work cannot be kept against a crash", lines: [String(reason)], choices: [] }),
    );
    return () => void stop();
  }, [document, host, window]);
  useEffect(() => {
    const show = (): void => {
      const state = document.getState();
      host.setTitle({ name: state.setup.title, handle: state.file?.handle ?? null, unsaved: isDirty(state) });
      trayView.showTray(state.setup.tray);
    };
    show();
    return document.subscribe(show);
  }, [document, host, trayView]);
  useEffect(() => {
    const onKey = (event: KeyboardEvent): void => actOnKey(event, act);
    globalThis.addEventListener("keydown", onKey);
    return () => globalThis.removeEventListener("keydown", onKey);
  }, [act]);

  const nextTheme = (): void => {
    const next = { ...settings, theme: THEMES[(THEMES.indexOf(settings.theme) + 1) % THEMES.length] };
    setSettings(next);
    void host.writeSettings(next);
  };
  const tray = (
    <>
      <DocumentTray
        document={document}
        planning={planning}
        client={client}
        trayView={trayView}
        theme={theme}
        shown={shown}
        markedPoints={markedPoints}
        onReadout={(readout) => window.set({ readout })}
      />
      <div className="zoom">
        <IconButton
          icon="tape"
          name="Measuring tape (M)"
          onPress={() => trayView.setTool(trayView.getState().tool === "tape" ? "hand" : "tape")}
        />
        <IconButton icon="further" name="Further away (−)" onPress={trayView.zoomOut} />
        <IconButton icon="whole" name="Whole tray (0)" onPress={trayView.fit} />
        <IconButton icon="closer" name="Closer (+)" onPress={trayView.zoomIn} />
      </div>
    </>
  );
  return (
    <Shell
      document={document}
      planning={planning}
      window={window}
      files={files}
      theme={settings.theme}
      onTheme={nextTheme}
      onPrint={() => void hand("printer")}
      tray={tray}
      startPage={<StartPage host={host} files={files} examples={EXAMPLES} onBack={() => window.set({ startPage: false })} />}
      sheets={
        <SheetsDesk
          document={document}
          planning={planning}
          loadSheets={loadSheets}
          choice={choice}
          onChoice={setChoice}
          onSave={() => void hand("file")}
          onPrint={() => void hand("printer")}
        />
      }
    />
  );
}

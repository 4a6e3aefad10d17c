import { type CSSProperties, useEffect, useMemo, useRef, useState } from "react";
import { useStore } from "zustand";
import type { Document } from "../document/document";
import { isCurrent, type Planning } from "../document/planning";
import { texts } from "../texts/texts";
import { PageStrip } from "./page-strip";
import { type PagePicture, type SheetSource, sheetChoiceOf } from "./sheet-choice";
import { SheetOptions, type SheetOptionsProps } from "./sheet-options";

const words = texts.sheets;

/** A page's picture inside the window's own page, so that it is set in the very font of the print. */
function SvgPage({ svg, label }: { readonly svg: string; readonly label: string }) {
  const place = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const parsed = new DOMParser().parseFromString(svg, "image/svg+xml").documentElement;
    parsed.setAttribute("width", "100%");
    parsed.removeAttribute("height");
    place.current?.replaceChildren(globalThis.document.importNode(parsed, true));
  }, [svg]);
  return <div ref={place} className="page-picture" role="img" aria-label={label} />;
}

export interface SheetsDeskProps extends Omit<SheetOptionsProps, "source" | "ready"> {
  readonly document: Document;
  readonly planning: Planning;
  readonly loadSheets: () => Promise<SheetSource>;
}

/** How large the pages are shown: two or more beside each other, as wide as there is room, or as large as they will be on paper. */
type Look = "whole" | "wide" | "true";
const LOOKS: readonly (readonly [Look, string])[] = [
  ["whole", words.wholePages],
  ["wide", words.fullWidth],
  ["true", words.trueSize],
];

/** The window's height that bars, captions and air take from a whole page. */
const AROUND_PAGE = "13rem";

function sizeOf({ widthMm, heightMm }: PagePicture, look: Look): CSSProperties {
  if (look === "true") return { width: `${widthMm}mm` };
  return look === "whole" ? { maxWidth: `calc((100vh - ${AROUND_PAGE}) * ${widthMm / heightMm})` } : {};
}

/** @returns which page is the first one to be seen in a scrolled area. */
function firstSeen(area: HTMLElement): number {
  const { top } = area.getBoundingClientRect();
  const figures = [...area.querySelectorAll("figure")];
  return Math.max(
    0,
    figures.findIndex((figure) => figure.getBoundingClientRect().bottom > top + 40),
  );
}

const reasonOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** The sheets before they are printed: pages in the tray's place, choices beside them. */
export function SheetsDesk({ document, planning, loadSheets, ...options }: SheetsDeskProps) {
  const setup = useStore(document, (state) => state.setup);
  const refusal = useStore(planning, (state) => state.refusal);
  const plan = useStore(planning, (state) => (isCurrent(state, setup) && state.plan?.quality !== "live" ? state.plan : null));
  const [source, setSource] = useState<SheetSource | null>(null);
  const [pages, setPages] = useState<readonly PagePicture[] | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [look, setLook] = useState<Look>("whole");
  const pagesPlace = useRef<HTMLElement>(null);
  const [first, setFirst] = useState(0);
  const { choice: pageChoice, settings } = options;
  const choice = useMemo(() => sheetChoiceOf(pageChoice, settings), [pageChoice, settings]);
  useEffect(() => {
    loadSheets().then(setSource, (error: unknown) => setFault(reasonOf(error)));
  }, [loadSheets]);
  useEffect(() => {
    if (source === null || plan === null) return;
    let wanted = true;
    source.pictures(setup, plan, choice).then(
      (made) => {
        if (!wanted) return;
        setPages(made);
        setFault(null);
      },
      (error: unknown) => wanted && setFault(reasonOf(error)),
    );
    return () => {
      wanted = false;
    };
  }, [source, setup, plan, choice]);

  const shown = refusal === null && fault === null ? (pages ?? []) : [];
  const goTo = (index: number): void => {
    const page = pagesPlace.current?.querySelectorAll("figure").item(index);
    page?.scrollIntoView({ block: "start" });
    page?.focus({ preventScroll: true });
  };
  return (
    <>
      <PageStrip pages={shown} first={Math.min(first, shown.length - 1)} onGo={goTo} />
      <main
        ref={pagesPlace}
        className={`pages pages-${look}`}
        aria-label={words.pagesLabel}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling area must be reachable by keyboard (WCAG 2.1.1)
        tabIndex={0}
        onScroll={({ currentTarget }) => setFirst(firstSeen(currentTarget))}
      >
        <fieldset className="pages-look chips" aria-label={words.look}>
          {LOOKS.map(([name, title]) => (
            <button key={name} type="button" aria-pressed={look === name} onClick={() => setLook(name)}>
              {title}
            </button>
          ))}
        </fieldset>
        {refusal !== null && <p className="pages-note">{words.refused(refusal.message)}</p>}
        {fault !== null && (
          <p className="pages-note" role="alert">
            {words.notMade(fault)}
          </p>
        )}
        {refusal === null && fault === null && shown.length === 0 && (
          <p className="pages-note">{pageChoice.pages.length === 0 ? words.noneChosen : words.making}</p>
        )}
        {shown.map((page, index) => (
          <figure key={page.id} tabIndex={-1} style={sizeOf(page, look)} className={plan === null ? "out-of-date" : ""}>
            <SvgPage svg={page.svg} label={words.pageLabel(index + 1, page.name, page.widthMm, page.heightMm)} />
            <figcaption>{words.pageOf(index + 1, shown.length, page.name)}</figcaption>
          </figure>
        ))}
      </main>
      <aside className="side" aria-label={texts.window.sides.sheets}>
        <SheetOptions source={source} ready={plan !== null} {...options} />
      </aside>
    </>
  );
}

import { useEffect, useRef, useState } from "react";
import { useStore } from "zustand";
import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { Document } from "../document/document";
import { isCurrent, type Planning } from "../document/planning";
import { ChoiceField, NumberField, Switch } from "./number-field";
import { LENGTHS_IN_MM } from "./read-number";

/** A page as the desk shows it: the very page that is printed. */
export interface PagePicture {
  /** Differs from page to page of a pack. */
  readonly id: string;
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly svg: string;
}

export type Paper = "a4" | "a3" | "a2" | "letter" | "tabloid";

export interface SheetChoice {
  readonly pages: readonly string[];
  readonly paper: Paper;
  readonly withPoints: boolean;
  readonly saveInk: boolean;
  readonly mirrored: boolean;
  /** What the printer makes of a true length along x and y; 1 where it prints true. */
  readonly printerScale: readonly [number, number];
}

/** Whoever makes the sheets; loaded when first used. */
export interface SheetSource {
  /** Names of pages with their titles, in the order of the pack. */
  readonly pageNames: readonly (readonly [name: string, title: string])[];
  readonly presets: readonly (readonly [title: string, pages: readonly string[]])[];
  /** @returns why a printer's scale is not believed, or null. */
  readonly scaleFault: (scale: readonly [number, number]) => string | null;
  readonly pictures: (setup: Setup, plan: Plan, choice: SheetChoice) => Promise<readonly PagePicture[]>;
  readonly pdf: (setup: Setup, plan: Plan, choice: SheetChoice) => Promise<Uint8Array<ArrayBuffer>>;
}

const PAPERS: readonly (readonly [Paper, string])[] = [
  ["a4", "A4"],
  ["a3", "A3"],
  ["a2", "A2"],
  ["letter", "US Letter"],
  ["tabloid", "Tabloid"],
];

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

export interface SheetsDeskProps {
  readonly document: Document;
  readonly planning: Planning;
  readonly loadSheets: () => Promise<SheetSource>;
  readonly choice: SheetChoice;
  readonly onChoice: (choice: SheetChoice) => void;
  readonly onSave: () => void;
  readonly onPrint: () => void;
}

const reasonOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** The sheets before they are printed: pages in the tray's place, choices beside them. */
export function SheetsDesk({ document, planning, loadSheets, choice, onChoice, onSave, onPrint }: SheetsDeskProps) {
  const setup = useStore(document, (state) => state.setup);
  const planned = useStore(planning);
  const [source, setSource] = useState<SheetSource | null>(null);
  const [pages, setPages] = useState<readonly PagePicture[]>([]);
  const [fault, setFault] = useState<string | null>(null);
  useEffect(() => {
    loadSheets().then(setSource, (error: unknown) => setFault(reasonOf(error)));
  }, [loadSheets]);
  const plan = isCurrent(planned, setup) && planned.plan?.quality !== "live" ? planned.plan : null;
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

  const toggle = (name: string, on: boolean): void => {
    const names = source?.pageNames.map(([one]) => one) ?? [];
    onChoice({ ...choice, pages: names.filter((one) => (one === name ? on : choice.pages.includes(one))) });
  };
  return (
    <>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling area must be reachable by keyboard (WCAG 2.1.1) */}
      <main className="pages" aria-label="Pages" tabIndex={0}>
        {planned.refusal !== null && <p className="hint">There is nothing to print yet: {planned.refusal.message}</p>}
        {fault !== null && (
          <p className="hint" role="alert">
            The pages could not be made: {fault}
          </p>
        )}
        {planned.refusal === null && pages.length === 0 && fault === null && (
          <p className="hint">Choose a page, and it appears here as it will be printed.</p>
        )}
        {planned.refusal === null &&
          pages.map((page, index) => (
            <figure
              key={page.id}
              style={{ aspectRatio: `${page.widthMm} / ${page.heightMm}` }}
              className={plan === null ? "out-of-date" : ""}
            >
              <SvgPage
                svg={page.svg}
                label={`Page ${index + 1}: ${page.name}, ${Math.round(page.widthMm)} by ${Math.round(page.heightMm)} mm`}
              />
              <figcaption>
                {index + 1} of {pages.length} · {page.name}
              </figcaption>
            </figure>
          ))}
      </main>
      <aside className="side" aria-label="Sheets">
        <section className="card">
          <h2>Sheets</h2>
          <ChoiceField label="Paper" value={choice.paper} choices={PAPERS} onSet={(paper) => onChoice({ ...choice, paper })} />
          {source !== null && source.presets.length > 0 && (
            <div className="choices">
              {source.presets.map(([title, names]) => (
                <button key={title} type="button" onClick={() => onChoice({ ...choice, pages: names })}>
                  {title}
                </button>
              ))}
            </div>
          )}
          <h3>Pages</h3>
          {source?.pageNames.map(([name, title]) => (
            <Switch key={name} label={title} on={choice.pages.includes(name)} onSet={(on) => toggle(name, on)} />
          ))}
          <h3>Template</h3>
          <Switch label="Probe points" on={choice.withPoints} onSet={(withPoints) => onChoice({ ...choice, withPoints })} />
          <Switch label="Mirrored, to read from below" on={choice.mirrored} onSet={(mirrored) => onChoice({ ...choice, mirrored })} />
          <Switch label="Save ink" on={choice.saveInk} onSet={(saveInk) => onChoice({ ...choice, saveInk })} />
          <h3>Printer</h3>
          <div className="pair">
            {(["x", "y"] as const).map((axis, place) => (
              <NumberField
                key={axis}
                label={`Bar along ${axis} measures`}
                unit="mm"
                units={LENGTHS_IN_MM}
                value={Number((100 * choice.printerScale[place]).toFixed(3))}
                step={0.1}
                onSet={(measuredMm) => {
                  const fault = source?.scaleFault([measuredMm / 100, measuredMm / 100]) ?? null;
                  if (fault !== null) return [{ where: "", message: fault }];
                  onChoice({
                    ...choice,
                    printerScale: axis === "x" ? [measuredMm / 100, choice.printerScale[1]] : [choice.printerScale[0], measuredMm / 100],
                  });
                  return [];
                }}
              />
            ))}
          </div>
          <p className="hint">Print at 100 %, never “fit to page”; then measure the two 100 mm bars.</p>
          <div className="choices">
            <button type="button" className="strong" disabled={plan === null || choice.pages.length === 0} onClick={onSave}>
              Save as PDF…
            </button>
            <button type="button" disabled={plan === null || choice.pages.length === 0} onClick={onPrint}>
              Print…
            </button>
          </div>
        </section>
      </aside>
    </>
  );
}

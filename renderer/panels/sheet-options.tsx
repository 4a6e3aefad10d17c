import type { Printer, Settings } from "../../shared-types/host";
import type { Problem } from "../../shared-types/result";
import { texts } from "../texts/texts";
import { ChoiceField, choicesOf, Switch, TextField } from "./fields";
import { IconButton } from "./icon-button";
import { NumberField } from "./number-field";
import { type DrawingKind, type PageChoice, type Paper, printerInUse, type SheetSource, withoutPrinter, withPrinter } from "./sheet-choice";

const words = texts.sheets;
const NO_PRINTER = "";

export interface SheetOptionsProps {
  readonly source: SheetSource | null;
  readonly choice: PageChoice;
  readonly onChoice: (choice: PageChoice) => void;
  readonly settings: Settings;
  readonly onSettings: (change: Partial<Settings>) => void;
  readonly ready: boolean;
  readonly onSave: () => void;
  readonly onPrint: () => void;
  readonly onSaveDrawing: (kind: DrawingKind) => void;
}

/** The printer and what it makes of a true 100 mm. */
function PrinterFields({ source, settings, onSettings }: Pick<SheetOptionsProps, "source" | "settings" | "onSettings">) {
  const used = printerInUse(settings);
  const change = (next: Partial<Printer>): readonly Problem[] => {
    const { scaleX = used?.scaleX ?? 1, scaleY = used?.scaleY ?? 1 } = next;
    const fault = source?.scaleFault([scaleX, scaleY]) ?? null;
    if (fault !== null) return [{ where: "", message: fault }];
    onSettings(withPrinter(settings, next, words.printerName(settings.printers.length + 1)));
    return [];
  };
  return (
    <>
      <div className="field-row">
        <ChoiceField<string>
          label={words.printer}
          value={settings.printer ?? NO_PRINTER}
          choices={[[NO_PRINTER, words.notMeasured], ...settings.printers.map(({ name }) => [name, name] as const)]}
          onSet={(name) => onSettings({ printer: name === NO_PRINTER ? null : name })}
        />
        {used !== null && (
          <IconButton icon="remove" name={words.forgetPrinter(used.name)} onPress={() => onSettings(withoutPrinter(settings))} />
        )}
      </div>
      {used !== null && (
        <TextField
          label={words.nameOfPrinter}
          value={used.name}
          onSet={(name) =>
            name.trim() === "" ? [{ where: "", message: words.printerNeedsName }] : change({ name: name.trim().slice(0, 100) })
          }
        />
      )}
      <div className="grid-2">
        {(["scaleX", "scaleY"] as const).map((key) => (
          <NumberField
            key={key}
            label={words.barMeasures(key === "scaleX" ? "x" : "y")}
            unit="mm"
            value={Number((100 * (used?.[key] ?? 1)).toFixed(3))}
            step={0.1}
            onSet={(measuredMm) => change({ [key]: measuredMm / 100 })}
          />
        ))}
      </div>
      <p className="hint">{words.barHint}</p>
    </>
  );
}

/** Which pages, on what paper, for which printer. */
export function SheetOptions(props: SheetOptionsProps) {
  const { source, choice, onChoice, settings, onSettings, ready, onSave, onPrint } = props;
  const toggle = (name: string, on: boolean): void => {
    const names = source?.pageNames.map(([one]) => one) ?? [];
    onChoice({ ...choice, pages: names.filter((one) => (one === name ? on : choice.pages.includes(one))) });
  };
  const bounded = (key: "wallMm" | "edgeMm", least: number, most: number) => (
    <NumberField
      label={words[key]}
      unit="mm"
      value={choice[key]}
      step={1}
      onSet={(value) => {
        if (value < least || value > most) return [{ where: "", message: words.outside(words[key], least, most) }];
        onChoice({ ...choice, [key]: value });
        return [];
      }}
    />
  );
  const same = (names: readonly string[]): boolean =>
    names.length === choice.pages.length && names.every((name) => choice.pages.includes(name));
  return (
    <>
      <section className="card" aria-label={words.title}>
        <h2>{words.title}</h2>
        <div className="choices choices-first">
          <button type="button" className="strong" disabled={!ready || choice.pages.length === 0} onClick={onSave}>
            {words.savePdf}
          </button>
          <button type="button" disabled={!ready || choice.pages.length === 0} onClick={onPrint}>
            {words.print}
          </button>
        </div>
        <p className="hint">{words.printHint}</p>
        <ChoiceField<Paper>
          label={words.paper}
          value={settings.paper}
          choices={choicesOf(words.papers)}
          onSet={(paper) => onSettings({ paper })}
        />
        <h3>{words.packs}</h3>
        <div className="chips">
          {source?.presets.map(([title, names]) => (
            <button key={title} type="button" aria-pressed={same(names)} onClick={() => onChoice({ ...choice, pages: names })}>
              {title}
            </button>
          ))}
        </div>
        <h3>{words.pages}</h3>
        {source?.pageNames.map(([name, title]) => (
          <Switch key={name} label={title} on={choice.pages.includes(name)} onSet={(on) => toggle(name, on)} />
        ))}
      </section>
      <section className="card" aria-label={words.drawing}>
        <h2>{words.drawing}</h2>
        <Switch label={words.withPoints} on={choice.withPoints} onSet={(withPoints) => onChoice({ ...choice, withPoints })} />
        <Switch label={words.mirrored} on={choice.mirrored} onSet={(mirrored) => onChoice({ ...choice, mirrored })} />
        <Switch label={words.fieldFullSize} on={choice.fieldFullSize} onSet={(fieldFullSize) => onChoice({ ...choice, fieldFullSize })} />
        <Switch label={words.saveInk} on={choice.saveInk} onSet={(saveInk) => onChoice({ ...choice, saveInk })} />
        <div className="grid-3">
          <ChoiceField<PageChoice["grid"]>
            label={words.grid}
            value={choice.grid}
            choices={choicesOf(words.grids)}
            onSet={(grid) => onChoice({ ...choice, grid })}
          />
          {bounded("wallMm", 0, 100)}
          {bounded("edgeMm", 4, 20)}
        </div>
        <div className="choices">
          {(["dxf", "svg"] as const).map((kind) => (
            <button key={kind} type="button" disabled={!props.ready} onClick={() => props.onSaveDrawing(kind)}>
              {words.saveDrawing(kind)}
            </button>
          ))}
        </div>
      </section>
      <section className="card" aria-label={words.printer}>
        <h2>{words.printerTitle}</h2>
        <PrinterFields source={source} settings={settings} onSettings={onSettings} />
      </section>
    </>
  );
}

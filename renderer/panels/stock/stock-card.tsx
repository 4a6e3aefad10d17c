import { useStore } from "zustand";
import type { Stock } from "../../../shared-types/stock";
import { changeSupply, changeTray } from "../../document/commands/bench";
import type { Document } from "../../document/document";
import { isPart, thingsById } from "../../document/edit";
import { sizeText, trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import { TextField } from "../fields";
import { IconButton } from "../icon-button";
import { NumberField } from "../number-field";
import type { WindowStore } from "../window-state";
import { traySize, withEntry, withParts, withSupply, withTray } from "./stock-changes";
import type { StockKeeper } from "./use-stock";

const words = texts.stock.card;
type Kind = "trays" | "parts" | "supplies";
interface Row {
  readonly name: string;
  readonly count: number;
  readonly what: string;
  /** Puts the entry to use in the open setup; parts are placed from the shelf. */
  readonly use?: () => void;
}

function Rows(props: { readonly kind: Kind; readonly rows: readonly Row[]; readonly keeper: StockKeeper }) {
  const { kind, rows, keeper } = props;
  const change = (index: number, next: { readonly name?: string; readonly count?: number } | null) => {
    keeper.keep(withEntry(keeper.stock, kind, index, next));
    return [];
  };
  if (rows.length === 0) return null;
  return (
    <>
      <h3>{words[kind]}</h3>
      <ul className="stock-rows">
        {rows.map(({ name, count, what, use }, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: entries of a stock list have no other identity than their place in it.
          <li key={index}>
            <div>
              <strong>{name}</strong>
              <span className="hint">{what}</span>
            </div>
            <NumberField
              label={words.countOf(name)}
              unit=""
              value={count}
              step={1}
              bare
              onSet={(next) => change(index, { count: Math.max(0, Math.round(next)) })}
            />
            {use !== undefined && <IconButton icon="add" name={words.use(name)} onPress={use} />}
            <IconButton icon="remove" name={words.drop(name)} onPress={() => change(index, null)} />
          </li>
        ))}
      </ul>
    </>
  );
}

function rowsOf(stock: Stock, document: Document): Readonly<Record<Kind, readonly Row[]>> {
  return {
    trays: stock.trays.map(({ name, count, tray }) => ({
      name,
      count,
      what: words.tray(traySize(tray), tray.baseMaterial),
      use: () => document.run(changeTray(tray)),
    })),
    parts: stock.parts.map(({ name, count, shape, material, heightMm }) => ({
      name,
      count,
      what: words.part(sizeText(shape), material, trimmed(heightMm, 1)),
    })),
    supplies: stock.supplies.map(({ name, count, waveform, mostVolts, mostAmperes, source }) => ({
      name,
      count,
      what: words.supply(waveform, trimmed(mostVolts, 2), trimmed(mostAmperes, 3)),
      use: () => {
        const { supply } = document.getState().setup;
        document.run(changeSupply({ waveform, source, currentLimitA: mostAmperes, volts: Math.min(supply.volts, mostVolts) }));
      },
    })),
  };
}

export interface StockCardProps {
  readonly document: Document;
  readonly window: WindowStore;
  readonly keeper: StockKeeper;
  /** A list to start from. */
  readonly example: Stock;
  readonly onImport: () => void;
  readonly onExport: () => void;
}

/** The stock list: what the prep room owns, counted; filled from what lies in the tray or from a file, and handed on as one. */
export function StockCard(props: StockCardProps) {
  const shown = useStore(props.window, (state) => state.stockShown);
  return shown ? <OpenStockCard {...props} /> : null;
}

function OpenStockCard({ document, window, keeper, example, onImport, onExport }: StockCardProps) {
  const setup = useStore(document, (state) => state.setup);
  const selection = useStore(document, (state) => state.selection);
  const { stock, keep } = keeper;
  const rows = rowsOf(stock, document);
  const empty = rows.trays.length + rows.parts.length + rows.supplies.length === 0;
  const parts = thingsById(setup, selection).filter(isPart);
  const close = (): void => window.set({ stockShown: false });
  return (
    <section className="float-card stock-card" aria-label={texts.stock.title} onKeyDown={(event) => event.key === "Escape" && close()}>
      <header className="card-head">
        <h2>{texts.stock.title}</h2>
        <IconButton icon="close" name={texts.stock.close} onPress={close} />
      </header>
      <TextField
        label={words.owner}
        value={stock.owner}
        onSet={(owner) => {
          keep({ ...stock, owner: owner.slice(0, 120) });
          return [];
        }}
      />
      {empty && <p className="hint">{words.empty}</p>}
      <Rows kind="trays" rows={rows.trays} keeper={keeper} />
      <Rows kind="parts" rows={rows.parts} keeper={keeper} />
      <Rows kind="supplies" rows={rows.supplies} keeper={keeper} />
      <div className="choices">
        <button type="button" disabled={parts.length === 0} onClick={() => keep(withParts(stock, parts))}>
          {words.addParts}
        </button>
        <button type="button" onClick={() => keep(withTray(stock, setup))}>
          {words.addTray}
        </button>
        <button type="button" onClick={() => keep(withSupply(stock, setup))}>
          {words.addSupply}
        </button>
      </div>
      <div className="choices">
        <button type="button" onClick={onImport}>
          {words.import}
        </button>
        <button type="button" disabled={empty} onClick={onExport}>
          {words.export}
        </button>
        {empty && (
          <button type="button" onClick={() => keep(example)}>
            {words.example}
          </button>
        )}
      </div>
    </section>
  );
}

import type { RemedyEdit } from "../../../shared-types/plan";
import type { Interface, Meter, Probing, Session, Setup, Shape, Slab, Supply, Tray, Water } from "../../../shared-types/setup";
import { DEFAULT_TOLERANCES, type Tolerances } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { type Edit, tidyMm } from "../edit";
import { freshId } from "./parts";

const words = texts.document.steps;

/** Edits of everything that is no part: tray, water, slabs, supply, meter, probing, session and texts. */

/** @returns the tray changed; a round tray becomes rectangular (or back) by handing in a whole tray. */
export const changeTray = (tray: Tray): Edit => ({ name: "tray", label: words.tray, apply: (setup) => ({ ...setup, tray }) });

/** @returns the water changed in these keys (slabs have their own edits). */
export const changeWater = (change: Partial<Omit<Water, "slabs">>): Edit => ({
  name: "water",
  label: words.water,
  apply: (setup) => ({ ...setup, water: { ...setup.water, ...change } }),
});

/** @returns the supply changed in these keys. AC without a frequency takes 50 Hz, since AC at 0 Hz is none. */
export const changeSupply = (change: Partial<Supply>): Edit => ({
  name: "supply",
  label: words.supply,
  apply: (setup) => {
    const supply = { ...setup.supply, ...change };
    const needsFrequency = change.waveform === "ac" && supply.frequencyHz <= 0;
    return { ...setup, supply: needsFrequency ? { ...supply, frequencyHz: 50 } : supply };
  },
});

/** @returns the estimate of the electrodes' surfaces changed in these keys. */
export const changeInterface = (change: Partial<Interface>): Edit => ({
  name: "interface",
  label: words.surfaces,
  apply: (setup) => ({ ...setup, interface: { ...setup.interface, ...change } }),
});

/** @returns the meter changed in these keys. */
export const changeMeter = (change: Partial<Meter>): Edit => ({
  name: "meter",
  label: words.meter,
  apply: (setup) => ({ ...setup, meter: { ...setup.meter, ...change } }),
});

/** @returns the probe plan's settings changed in these keys. */
export const changeProbing = (change: Partial<Probing>): Edit => ({
  name: "probing",
  label: words.probing,
  apply: (setup) => ({ ...setup, probing: { ...setup.probing, ...change } }),
});

/** @returns the stated tolerances changed in these keys; a setup that states none starts from the defaults. */
export const changeTolerances = (change: Partial<Tolerances>): Edit => ({
  name: "tolerances",
  label: words.tolerances,
  apply: (setup) => ({ ...setup, tolerances: { ...(setup.tolerances ?? DEFAULT_TOLERANCES), ...change } }),
});

/** @returns the session changed in these keys. */
export const changeSession = (change: Partial<Session>): Edit => ({
  name: "session",
  label: words.session,
  apply: (setup) => ({ ...setup, session: { ...setup.session, ...change } }),
});

/** @returns another title. Typing on joins into one step until the document settles. */
export const setTitle = (title: string): Edit => ({
  name: "title",
  label: words.title,
  apply: (setup) => ({ ...setup, title }),
  joins: "title",
});

/** @returns other notes. Typing on joins into one step until the document settles. */
export const setNotes = (notes: string): Edit => ({
  name: "notes",
  label: words.notes,
  apply: (setup) => ({ ...setup, notes }),
  joins: "notes",
});

/** @returns a new slab on the bed with its centre at a place (mm). It is selected afterwards. */
export function addSlab(shape: Shape, thicknessMm: number, xMm: number, yMm: number): Edit {
  return {
    name: "add",
    label: words.add("slab"),
    apply: (setup) => {
      const slab: Slab = { id: freshId(setup), xMm: tidyMm(xMm), yMm: tidyMm(yMm), turnDeg: 0, thicknessMm, shape };
      return { ...setup, water: { ...setup.water, slabs: [...setup.water.slabs, slab] } };
    },
  };
}

/** @returns one slab of another thickness, mm. */
export const setThickness = (id: string, thicknessMm: number): Edit => ({
  name: "thickness",
  label: words.thickness(texts.document.things.slab(id)),
  apply: (setup) => ({
    ...setup,
    water: { ...setup.water, slabs: setup.water.slabs.map((slab) => (slab.id === id ? { ...slab, thicknessMm } : slab)) },
  }),
});

function withValueAt(data: unknown, path: readonly string[], value: unknown): unknown {
  const [key, ...rest] = path;
  if (key === undefined) return value;
  if (Array.isArray(data)) return data.map((item: unknown, index) => (index === Number(key) ? withValueAt(item, rest, value) : item));
  const object = typeof data === "object" && data !== null ? data : {};
  return { ...object, [key]: withValueAt(Reflect.get(object, key), rest, value) };
}

/** @returns the edit that a finding offers as its remedy: one key of the setup given another value. */
export function applyRemedy({ path, value }: RemedyEdit): Edit {
  const keys = path.replace(/\[(\d+)\]/g, ".$1").split(".");
  // The document checks the result against the schema, as it does for every edit.
  return { name: "remedy", label: words.remedy, apply: (setup) => withValueAt(setup, keys, value) as Setup };
}

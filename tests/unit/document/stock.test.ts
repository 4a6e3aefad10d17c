import { describe, expect, it } from "vitest";
import { changeSession, changeSupply } from "../../../renderer/document/commands/bench";
import { resizeThing } from "../../../renderer/document/commands/placing";
import { stockFindings } from "../../../renderer/document/stock-findings";
import { saltmarshStock } from "../../../renderer/examples/saltmarsh-stock";
import { withEntry, withParts, withSupply, withTray } from "../../../renderer/panels/stock/stock-changes";
import { EMPTY_STOCK, parseStockText, stockText } from "../../../shared-types/stock";
import { looseRing } from "./fixtures";

const found = (setup = looseRing, stock = saltmarshStock) => stockFindings(setup, stock).map(({ code, message }) => `${code}: ${message}`);

describe("what a plan needs and the stock lacks", () => {
  it("is nothing where the list covers every tray of the session, and nothing where nothing is listed", () => {
    expect(found()).toEqual([]);
    expect(found(changeSession({ trays: 9 }).apply(looseRing), EMPTY_STOCK)).toEqual([]);
  });

  it("counts parts, trays and supplies for every tray of the session", () => {
    // Two trays of the loose ring take four bars and two rings: what the prep room owns. Three take one ring more.
    expect(found(changeSession({ trays: 2 }).apply(looseRing))).toEqual([]);
    expect(found(changeSession({ trays: 3 }).apply(looseRing))).toEqual([
      "stock-parts: 3 × brass ring ⌀ 60 outside, 54 inside mm, 24 mm high needed, 2 in stock.",
    ]);
    expect(found(changeSession({ trays: 7 }).apply(looseRing)).map((line) => line.split(":")[0])).toEqual([
      "stock-trays",
      "stock-parts",
      "stock-parts",
      "stock-supplies",
    ]);
  });

  it("names a size that nobody owns, with the parts that have it", () => {
    const setup = resizeThing(looseRing, "A", { kind: "bar", lengthMm: 101, widthMm: 10 }).apply(looseRing);
    const [lacking] = stockFindings(setup, saltmarshStock);
    expect(lacking).toMatchObject({
      partIds: ["A"],
      severity: "caution",
      message: "The stock list has no brass bar 101 × 10 mm, 24 mm high.",
    });
  });

  it("takes a supply only where it reaches the volts, in the same kind of current", () => {
    expect(found(changeSupply({ volts: 12 }).apply(looseRing))).toEqual([]);
    expect(found(changeSupply({ volts: 13 }).apply(looseRing))[0]).toMatch(/^stock-supplies: The stock list has no AC supply for 13 V/);
    expect(found(changeSupply({ waveform: "dc" }).apply(looseRing))).toHaveLength(1);
  });
});

describe("a stock list", () => {
  it("is filled from what lies in the tray, counting what it knows already", () => {
    const listed = withSupply(withTray(withParts(EMPTY_STOCK, looseRing.parts), looseRing), looseRing);
    expect(listed.parts.map(({ name, count }) => [name, count])).toEqual([
      ["Left bar", 2],
      ["Loose ring", 1],
    ]);
    expect(found(looseRing, listed)).toEqual([]);
    expect(withEntry(listed, "parts", 0, { count: 1 }).parts[0]?.count).toBe(1);
    expect(withEntry(listed, "parts", 0, null).parts.map(({ name }) => name)).toEqual(["Loose ring"]);
  });

  it("survives saving and reading", () => {
    const read = parseStockText(stockText(saltmarshStock));
    expect(read.ok && read.value).toEqual(saltmarshStock);
  });

  it.each([
    ["{", "not valid JSON"],
    [JSON.stringify(looseRing), 'format must be "fieldtray.stock"'],
    [JSON.stringify({ ...saltmarshStock, shelves: [] }), "shelves is not a key"],
    [JSON.stringify({ ...saltmarshStock, parts: [{ ...saltmarshStock.parts[0], count: -1 }] }), "parts[0].count is -1"],
  ])("that is none is refused in words: %#", (text, words) => {
    const read = parseStockText(text);
    expect(read.ok ? "" : read.problems[0]?.message).toContain(words);
  });
});

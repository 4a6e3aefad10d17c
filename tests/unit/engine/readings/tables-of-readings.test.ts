import { describe, expect, it } from "vitest";
import { readTable } from "../../../../renderer/engine/readings/read-table";
import type { ProbePoint } from "../../../../shared-types/plan";

const point = (n: number, xMm: number, yMm: number): ProbePoint => ({
  n,
  xMm,
  yMm,
  inside: null,
  volts: n,
  voltsError: 0,
  voltsPerMm: 0.04,
  directionDeg: 0,
  bandV: 0.06,
});
const POINTS = [point(1, 80, 100), point(2, 80.5, 60), point(3, 120, 100), point(4, 150, 100)];
const voltsOf = (text: string): (readonly [number, number])[] =>
  readTable(text, POINTS).readings.map(({ n, volts }) => [n, volts] as const);
const ALL = [
  [1, 0.75],
  [2, 1.5],
  [3, -2.25],
];

describe("a table of readings is read as spreadsheets hand it over", () => {
  it.each([
    ["commas and points, with a header", "n,reading_V\r\n1,0.75\r\n2,1.5\r\n3,-2.25\r\n"],
    ["semicolons and decimal commas, with a header", "No.;read V\n1;0,75\n2;1,5\n3;-2,25"],
    ["tabs and decimal commas, no header", "1\t0,75\n2\t1,5\n3\t−2,25\n"],
    ["tabs and decimal points, old line ends", "1\t0.75\r2\t1.5\r3\t-2.25"],
    ["volts alone, in the order of the points", "0.75\n1.5\n-2.25"],
    ["volts alone, headed", "volts\n0.75\n1.5\n-2.25"],
    ["quoted decimal commas between commas", '1,"0,75"\n2,"1,5"\n3,"-2,25"'],
    ["place and volts, columns in another order", "reading V\tx mm\ty mm\n0.75\t80\t100\n1.5\t80.5\t60\n-2.25\t120\t100"],
    ["number, place and volts without a header", "1;80;100;0,75\n2;80,5;60;1,5\n3;120;100;-2,25"],
    ["units behind the number", "1;750 mV\n2;1.5 V\n3;-2250mV"],
    ["a byte order mark and empty lines", "\uFEFFn;volts\n\n1;0.75\n;\n2;1.5\n\n3;-2.25\n\n"],
  ])("%s", (_, text) => {
    expect(readTable(text, POINTS).wrong).toEqual([]);
    expect(voltsOf(text)).toEqual(ALL);
  });

  it("the program's own probe table is taken back, and points without a reading are passed over", () => {
    const text =
      "n,level_V,x_mm,y_mm,expected_V,band_V,inside,reading_V\r\n1,0.75,80.0,100.0,0.75,0.06,,0.76\r\n2,0.75,80.5,60.0,0.75,0.06,,\r\n";
    const table = readTable(text, POINTS);
    expect(table.readings).toEqual([{ n: 1, xMm: 80, yMm: 100, volts: 0.76 }]);
    expect(table.blank).toBe(1);
    expect(table.wrong).toEqual([]);
  });
});

describe("wrong rows are named by their line and reason, the rest is taken", () => {
  it("each kind of wrong row", () => {
    const table = readTable('n;volts\n1;0.75\n9;1\n2;OL\n3;5000\n1;0.8\n4;"3.0\n', POINTS);
    expect(table.readings.map(({ n }) => n)).toEqual([1]);
    expect(table.wrong.map(({ line, fault }) => [line, fault])).toEqual([
      [3, "no-such-point"],
      [4, "not-a-number"],
      [5, "out-of-range"],
      [6, "twice"],
      [7, "open-quote"],
    ]);
  });

  it("a place that is no point of the plan is not taken for the nearest one", () => {
    expect(readTable("x,y,volts\n81,100,0.75", POINTS).wrong).toMatchObject([{ line: 2, fault: "no-such-place" }]);
  });

  it("a line end inside quotes belongs to its row, and lines are counted on", () => {
    const table = readTable('n,remark,volts\n1,"two\nlines",0.75\n7,,1\n', POINTS);
    expect(table.readings).toHaveLength(1);
    expect(table.wrong).toMatchObject([{ line: 4, fault: "no-such-point" }]);
  });

  it("'3,4' is not guessed to be point 3 at 4 V nor 3.4 V", () => {
    const table = readTable("1,4\n2,5\n", POINTS);
    expect(table.readings).toEqual([]);
    expect(table.wrong.map(({ fault }) => fault)).toEqual(["ambiguous", "ambiguous"]);
  });

  it("a column of decimal commas is not guessed to be two columns, with a header or without", () => {
    expect(readTable("0,75\n1,5\n-2,25\n3\n", POINTS).wrong.map(({ fault }) => fault)).toEqual(Array(4).fill("ambiguous"));
    expect(readTable("volts\n0,75\n1,5", POINTS)).toMatchObject({ readings: [], wrong: [{ fault: "columns" }, { fault: "columns" }] });
  });

  it("a table without volts, or with more columns than are known, says so", () => {
    expect(readTable("x,y\n80,100", POINTS).wrong).toMatchObject([{ line: 2, fault: "no-volts" }]);
    expect(readTable("1;2;3;4;5", POINTS).wrong).toMatchObject([{ line: 1, fault: "columns" }]);
  });

  it("no text at all is no fault", () => {
    expect(readTable("", POINTS)).toEqual({ readings: [], found: [], wrong: [], blank: 0 });
    expect(readTable("\r\n\r\n", POINTS).wrong).toEqual([]);
  });
});

it("places that were found come in under their own header", () => {
  const table = readTable("found_V;x_mm;y_mm\n3,0;150,5;40\n3,0;;50\n", POINTS);
  expect(table.found).toEqual([{ volts: 3, xMm: 150.5, yMm: 40 }]);
  expect(table.wrong).toMatchObject([{ line: 3, fault: "columns" }]);
});

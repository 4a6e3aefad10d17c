import { expect, it } from "vitest";
import { FIRST_CHOICE, printerInUse, sheetChoiceOf, withoutPrinter, withPrinter } from "../../../renderer/panels/sheet-choice";
import { settingsSchema } from "../../../shared-types/host";

const settings = settingsSchema.parse({});

it("without a measured printer lengths are printed as they are", () => {
  expect(sheetChoiceOf(FIRST_CHOICE, settings).printerScale).toEqual([1, 1]);
});

it("the first measurement makes a printer and puts it to use", () => {
  const measured = { ...settings, ...withPrinter(settings, { scaleX: 0.996 }, "Printer 1") };
  expect(printerInUse(measured)).toEqual({ name: "Printer 1", scaleX: 0.996, scaleY: 1 });
  expect(sheetChoiceOf(FIRST_CHOICE, measured).printerScale).toEqual([0.996, 1]);
});

it("a renamed printer keeps its scale and takes the place of the one before", () => {
  const first = { ...settings, ...withPrinter(settings, { scaleX: 0.99, scaleY: 1.01 }, "Printer 1") };
  const renamed = { ...first, ...withPrinter(first, { name: "Prep room" }, "unused") };
  expect(renamed.printers).toEqual([{ name: "Prep room", scaleX: 0.99, scaleY: 1.01 }]);
  expect(renamed.printer).toBe("Prep room");
});

it("a forgotten printer leaves the others alone, and prints go without correction", () => {
  const two = {
    ...settings,
    printers: [
      { name: "Office", scaleX: 1.002, scaleY: 1 },
      { name: "Prep room", scaleX: 0.99, scaleY: 1 },
    ],
    printer: "Prep room",
  };
  const left = { ...two, ...withoutPrinter(two) };
  expect(left.printers.map(({ name }) => name)).toEqual(["Office"]);
  expect(sheetChoiceOf(FIRST_CHOICE, left).printerScale).toEqual([1, 1]);
});

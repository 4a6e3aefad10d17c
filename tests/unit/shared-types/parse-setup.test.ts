import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseSetup, parseSetupText, setupText } from "../../../shared-types/parse-setup";
import type { Setup } from "../../../shared-types/setup";
import { setupId } from "../../../shared-types/setup-id";
import { trayWith } from "../../reference/solved";

const sound = trayWith({
  parts: [
    { id: "A", role: "electrode", tap: 0, xMm: 65, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
    { id: "B", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
  ],
});

/** A copy of the sound setup as plain data with one value changed. */
function withValue(path: string, value: unknown): unknown {
  const data: unknown = JSON.parse(JSON.stringify(sound));
  const keys = path.split(".");
  let place: unknown = data;
  for (const key of keys.slice(0, -1)) place = Reflect.get(place as object, key);
  Reflect.set(place as object, keys[keys.length - 1], value);
  return data;
}

const firstMessage = (data: unknown): string => {
  const parsed = parseSetup(data);
  return parsed.ok ? "" : parsed.problems[0].message;
};

describe("a setup file", () => {
  it("is read back as it was written", () => {
    const parsed = parseSetupText(setupText(sound));
    expect(parsed).toEqual({ ok: true, value: sound });
  });

  it.each([
    ["tray.lengthMm", 12, ["tray.lengthMm", "12", "20 to 2000"]],
    ["tray.widthMm", 2400, ["tray.widthMm", "2400", "20 to 2000"]],
    ["water.depthMm", 0.2, ["water.depthMm", "0.2", "0.5 to 200"]],
    ["water.depthMm", "ten", ["water.depthMm", '"ten"', "0.5 to 200"]],
    ["water.depthMm", undefined, ["water.depthMm", "missing", "0.5 to 200"]],
    ["probing.levels", 2.5, ["probing.levels", "2.5", "a whole number from 1 to 99"]],
    ["title", 7, ["title", "7", "a string"]],
    ["supply.waveform", "square", ["supply.waveform", '"square"', '"ac" or "dc"']],
    ["parts.0.role", "magnet", ["parts[0].role", '"magnet"', '"electrode"']],
    ["parts.0.tap", 1.5, ["parts[0].tap", "1.5", "0 to 1"]],
    ["parts.1.shape.innerMm", 70, ["parts[1].shape.innerMm", "70", "less than outerMm (60)"]],
    ["parts.1.shape.kind", "blob", ["parts[1].shape", "blob"]],
    ["parts.1.id", "A", ["parts[1].id", '"A"', "no other part"]],
    ["water.colour", "blue", ["water.colour", "not a key"]],
    ["version", 7, ["version is 7", "newer Fieldtray"]],
    ["format", "other", ["format", '"other"', "fieldtray.setup"]],
  ])("with a wrong %s is refused with key, value and range", (path, value, words) => {
    const message = firstMessage(withValue(path, value));
    for (const word of words) expect(message).toContain(word);
  });

  it("with a polygon that crosses itself is refused with the polygon's key", () => {
    const bow = {
      kind: "polygon",
      pointsMm: [
        [0, 0],
        [10, 10],
        [10, 0],
        [0, 10],
      ],
    };
    expect(firstMessage(withValue("parts.1.shape", bow))).toMatch(/parts\[1\]\.shape\.pointsMm has edges 0 and 2 that meet/);
  });

  it("of a file names the part by its id beside its place in the list", () => {
    const parsed = parseSetupText(JSON.stringify(withValue("parts.1.turnDeg", "up")));
    expect(parsed.ok ? "" : parsed.problems[0].message).toMatch(/^parts\[1\]\.turnDeg is "up", allowed: .*, in "B"$/);
  });

  it.each([
    ["nothing", ""],
    ["cut off", '{"format": "fieldtray.setup", "version": 1'],
    ["a list", "[1, 2]"],
    ["not finite", setupText(sound).replace('"xMm": 65', '"xMm": 1e999')],
    ["6 MB long", `"${"x".repeat(6 * 1024 * 1024)}"`],
    ["deeply nested", `${'{"format":"fieldtray.setup","version":1,"notes":'}${"[".repeat(200)}${"]".repeat(200)}}`],
  ])("that is %s is refused in words", (_, text) => {
    const parsed = parseSetupText(text);
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) expect(parsed.problems[0].message.length).toBeGreaterThan(10);
  });

  it("never brings the reader down, however it is damaged", () => {
    const text = setupText(sound);
    fc.assert(
      fc.property(fc.nat(text.length - 1), fc.nat(40), fc.string({ maxLength: 12 }), (start, length, inserted) => {
        const parsed = parseSetupText(text.slice(0, start) + inserted + text.slice(start + length));
        return parsed.ok || parsed.problems.length > 0;
      }),
      { numRuns: 1000, seed: 11 },
    );
  });
});

describe("a setup's id", () => {
  const reordered = (setup: Setup): unknown => Object.fromEntries(Object.entries(setup).reverse());

  it("has the form of two groups of four and belongs to the content, not to the order of its keys", () => {
    expect(setupId(sound)).toMatch(/^[0-9A-HJKMNP-TV-Z]{4}-[0-9A-HJKMNP-TV-Z]{4}$/);
    const parsed = parseSetup(reordered(sound));
    expect(parsed.ok && setupId(parsed.value)).toBe(setupId(sound));
  });

  it("changes with any number", () => {
    const parsed = parseSetup(withValue("supply.volts", 6.001));
    expect(parsed.ok && setupId(parsed.value)).not.toBe(setupId(sound));
  });
});

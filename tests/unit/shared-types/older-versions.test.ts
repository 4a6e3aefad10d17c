import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { parseSetupText, setupText } from "../../../shared-types/parse-setup";

/** A file of every version that was ever written, kept as it was: it opens for ever and means what it meant. */

const folder = fileURLToPath(new URL("fixtures/", import.meta.url));
const files = readdirSync(folder).map((name) => ({ name, text: readFileSync(`${folder}${name}`, "utf8") }));
const opened = (text: string) => {
  const parsed = parseSetupText(text);
  if (!parsed.ok) throw new Error(parsed.problems.map(({ message }) => message).join("; "));
  return parsed.value;
};

describe("setup files of every version", () => {
  it("are kept for all versions up to the one that is written now", () => {
    const written = opened(files[0].text).version;
    expect(files.map(({ name }) => name).sort()).toEqual(Array.from({ length: written }, (_, k) => `version-${k + 1}.fieldtray.json`));
    for (const { name, text } of files) expect(JSON.parse(text).version).toBe(Number(/\d+/.exec(name)?.[0]));
  });

  it.each(files)("$name opens, with what the file leaves out filled in, and is saved as the present version", ({ text }) => {
    const setup = opened(text);
    expect(setup).toMatchObject({
      title: "Every kind of thing",
      tray: { lengthMm: 400, widthMm: 300, wallHeightMm: 40, baseMm: 3 },
      water: { depthMm: 14, tiltXDeg: 0.5, salt: "none", slabs: [{ id: "S1", thicknessMm: 4 }] },
      supply: { volts: 6, openCircuitVolts: 7.5, currentLimitA: 1, source: "safety-isolated" },
      meter: { inputMegohm: 10, counts: 2000 },
      probing: { levels: 5 },
    });
    expect(setup.parts.map(({ id, role, shape }) => `${id} ${role} ${shape.kind}`)).toEqual([
      "A electrode bar",
      "B electrode disc",
      "C floating ring",
      "D floating frame",
      "E insulator polygon",
    ]);
    expect(opened(setupText(setup))).toEqual(setup);
  });

  it("of a version to come are refused, and say that a newer program wrote them", () => {
    const [{ text }] = files;
    for (const version of [2, 3, 1000]) {
      const parsed = parseSetupText(text.replace('"version": 1', `"version": ${version}`));
      expect(parsed.ok).toBe(false);
      if (!parsed.ok)
        expect(parsed.problems[0].message).toBe(`version is ${version}, allowed: 1; this setup was saved by a newer Fieldtray`);
    }
  });
});

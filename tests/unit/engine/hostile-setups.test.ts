import { describe, expect, it } from "vitest";
import { parseSetup } from "../../../shared-types/parse-setup";
import { hostileSetup } from "./hostile-setups";
import { expectSoundOrRefused } from "./sound-or-refused";

const EACH = 250;

describe("of 2,000 setups that nobody would wish for, none crashes the engine or gets a number that is none:", () => {
  const counts = { refusedAsFile: 0, refusedAsLayout: 0, planned: 0 };

  it.each(Array.from({ length: 2000 / EACH }, (_, block) => block * EACH))(
    "numbers %i and following",
    async (first) => {
      for (let seed = first; seed < first + EACH; seed++) {
        const parsed = parseSetup(hostileSetup(seed));
        if (!parsed.ok) {
          counts.refusedAsFile++;
          for (const { message } of parsed.problems) expect(message.length).toBeGreaterThan(10);
          continue;
        }
        try {
          counts[(await expectSoundOrRefused(parsed.value)) ? "planned" : "refusedAsLayout"]++;
        } catch (error) {
          throw new Error(`setup ${seed}: ${error instanceof Error ? error.message : String(error)}`, { cause: error });
        }
      }
    },
    300_000,
  );

  it("and all three ends are met often enough to mean something", () => {
    for (const count of Object.values(counts)) expect(count).toBeGreaterThan(200);
  });
});

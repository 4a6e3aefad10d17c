import { expect, it } from "vitest";
import { isFlat } from "../../../../renderer/panels/tolerance/flat-place";

it("a place is flat when a millimetre does not move the last digit, such as the water inside a loose ring", () => {
  expect(isFlat({ voltsPerMm: 0 }, 0.01)).toBe(true);
  expect(isFlat({ voltsPerMm: 0.0099 }, 0.01)).toBe(true);
  expect(isFlat({ voltsPerMm: 0.01 }, 0.01)).toBe(false);
});

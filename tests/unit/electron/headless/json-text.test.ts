import fc from "fast-check";
import { expect, it } from "vitest";
import { jsonText } from "../../../../electron/headless/json-text";

it("what is printed reads back as what it was", () => {
  fc.assert(
    fc.property(fc.jsonValue(), (value) => {
      expect(JSON.parse(jsonText(value))).toEqual(JSON.parse(JSON.stringify(value)));
    }),
    { seed: 5, numRuns: 500 },
  );
});

it("a probe point stands on one line, what is no number is null, and nothing is lost", () => {
  const text = jsonText({
    points: [
      { n: 1, volts: Number.NaN, gone: undefined },
      { n: 2, volts: -0.5 },
    ],
    none: [],
    empty: {},
  });
  expect(text.split("\n")).toEqual([
    "{",
    '  "points": [',
    '    { "n": 1, "volts": null },',
    '    { "n": 2, "volts": -0.5 }',
    "  ],",
    '  "none": [],',
    '  "empty": {}',
    "}",
  ]);
});

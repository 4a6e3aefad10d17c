import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { parseSetupText, setupText } from "../../../shared-types/parse-setup";

/** What may become of a file: on a bad stick, in a careless editor, in the hands of somebody who means harm. */

const originals = EXAMPLES.map(({ setup }) => setupText(setup));

type Mutation = (text: string) => string;

/** A place in a text, whatever its length. */
const share = fc.double({ min: 0, max: 1, noNaN: true });

const atText: fc.Arbitrary<Mutation> = fc.oneof(
  fc.tuple(share, fc.integer({ min: 1, max: 40 })).map(([at, length]): Mutation => {
    return (text) => text.slice(0, at * text.length) + text.slice(at * text.length + length);
  }),
  fc.tuple(share, fc.string({ unit: "binary", maxLength: 12 })).map(([at, piece]): Mutation => {
    return (text) => text.slice(0, at * text.length) + piece + text.slice(at * text.length);
  }),
  share.map(
    (at): Mutation =>
      (text) =>
        text.slice(0, at * text.length),
  ),
  fc.constant<Mutation>((text) => text + text),
  fc.constant<Mutation>((text) => `\uFEFF${text}`),
);

const HOSTILE_KEYS = ["__proto__", "constructor", "toString", "version", "format", "kind", "role", "shape", "tap", ""] as const;
const hostileValue = fc.oneof(
  fc.jsonValue({ maxDepth: 3 }),
  fc.constantFrom<unknown>(null, -1, 0, 1e308, -1e308, 1e-320, 2 ** 53, "", "NaN", [], {}, true, "x".repeat(100_000)),
  fc.integer({ min: 1, max: 400 }).map((depth) => JSON.parse(`${"[".repeat(depth)}${"]".repeat(depth)}`) as unknown),
  fc.integer({ min: 1, max: 3000 }).map((count): unknown => Array.from({ length: count }, (_, index) => [index, -index])),
);

/** All places inside a document, as pairs of an owner and a key. */
function placesOf(value: unknown, found: [object, string][] = []): [object, string][] {
  if (typeof value !== "object" || value === null) return found;
  for (const [key, inner] of Object.entries(value)) {
    found.push([value, key]);
    placesOf(inner, found);
  }
  return found;
}

function changed(text: string, at: number, change: (owner: object, key: string) => void): string {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return text;
  }
  const places = placesOf(data);
  const place = places[Math.min(places.length - 1, Math.floor(at * places.length))];
  if (place !== undefined) change(...place);
  return JSON.stringify(data) ?? "";
}

const atData: fc.Arbitrary<Mutation> = fc.oneof(
  fc.tuple(share, hostileValue).map(([at, value]): Mutation => {
    return (text) => changed(text, at, (owner, key) => Reflect.set(owner, key, value));
  }),
  share.map(
    (at): Mutation =>
      (text) =>
        changed(text, at, (owner, key) => Reflect.deleteProperty(owner, key)),
  ),
  fc.tuple(share, fc.constantFrom(...HOSTILE_KEYS), hostileValue).map(([at, name, value]): Mutation => {
    const added = { value, enumerable: true, configurable: true, writable: true };
    return (text) => changed(text, at, (owner) => Object.defineProperty(owner, name, added));
  }),
);

const mutated = fc
  .tuple(fc.constantFrom(...originals), fc.array(fc.oneof(atText, atData, atData), { minLength: 1, maxLength: 4 }))
  .map(([text, mutations]) => mutations.reduce((before, mutate) => mutate(before), text));

describe("5000 mutated setup files", () => {
  it("are each either a sound setup or refused in words, and never shake the program", { timeout: 240_000 }, () => {
    const seen = { sound: 0, refused: 0 };
    const prototype = Object.getOwnPropertyNames(Object.prototype).length;
    fc.assert(
      fc.property(mutated, (text) => {
        const parsed = parseSetupText(text);
        if (parsed.ok) {
          seen.sound++;
          // What was let in can be saved and opened again without a change.
          expect(parseSetupText(setupText(parsed.value))).toEqual(parsed);
          return;
        }
        seen.refused++;
        expect(parsed.problems.length).toBeGreaterThan(0);
        for (const { message } of parsed.problems) {
          expect(message.length).toBeGreaterThan(10);
          expect(message).not.toMatch(/undefined|\[object|Invalid input|Cannot read/);
        }
      }),
      { numRuns: 5000 },
    );
    expect(Object.getOwnPropertyNames(Object.prototype).length).toBe(prototype);
    // Both ends are met, else the mutations would be too mild or too wild to show anything.
    expect(seen.sound).toBeGreaterThan(100);
    expect(seen.refused).toBeGreaterThan(1000);
  });

  it("are refused before they are read when they are larger than 5 MB or nested beyond reason", () => {
    const nested = `{"format":"fieldtray.setup","version":1,"notes":${"[".repeat(100_000)}${"]".repeat(100_000)}}`;
    for (const text of [" ".repeat(5 * 1024 * 1024 + 1), nested]) {
      const parsed = parseSetupText(text);
      expect(parsed.ok).toBe(false);
    }
  });
});

import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { barsWithLooseRing, bench, headless, headlessByNpm } from "./command";

/** What the headless command refuses: exit code 2, nothing on standard output, a message that names what is wrong. */

const place = bench();
let sound = "";

beforeAll(() => {
  sound = place.file("sound.fieldtray.json", barsWithLooseRing);
  // Builds what is stale, so that the tests below run the command of this source.
  expect(headlessByNpm("--help").exitCode).toBe(0);
}, 180_000);
afterAll(() => place.clear());

function refusal(...args: string[]): string {
  const { exitCode, stdout, stderr } = headless(...args);
  expect(exitCode, stderr).toBe(2);
  expect(stdout).toBe("");
  return stderr;
}

/** The sound setup as text with one stretch of it replaced. */
const altered = (from: string, to: string): string => {
  const text = JSON.stringify(barsWithLooseRing);
  expect(text).toContain(from);
  return text.replace(from, to);
};

describe("a command line that is wrong is refused: it", () => {
  it("without a verb lists the verbs", () => {
    expect(refusal()).toMatch(/no verb is given, allowed: solve, probes, check, sheets/);
  });

  it("with an unknown verb names it", () => {
    expect(refusal("plot", sound)).toMatch(/"plot" is no verb, allowed: solve, probes, check, sheets/);
  });

  it("without a file asks for it", () => {
    expect(refusal("solve")).toContain("solve needs a setup file");
  });

  it("with two files names the second", () => {
    expect(refusal("solve", sound, "other.json")).toContain('"other.json"');
  });

  it.each([
    ["solve", ["--pitch", "1"], "--pitch is no option of solve, allowed: --at, --quality"],
    ["probes", ["--quality", "live"], "--quality is no option of probes, allowed: no option"],
    ["check", ["--at=1,1"], "--at is no option of check"],
    ["solve", ["--quality", "best"], '--quality is "best", allowed: live, print, reference'],
    ["solve", ["--quality", "live", "--quality", "print"], "--quality is given twice"],
    ["solve", ["--at"], "--at has no value"],
    ["solve", ["--at", "150"], '--at holds "150"'],
    ["solve", ["--at", "150,100 12,x"], '--at holds "12,x"'],
    ["solve", ["--at", "1,2,3"], '--at holds "1,2,3"'],
  ])("%s %j says what is allowed", (verb, options, words) => {
    expect(refusal(verb, sound, ...options)).toContain(words);
  });

  it("through npm has the same exit code", () => {
    expect(headlessByNpm("plot", sound).exitCode).toBe(2);
  });
});

describe("a file that is wrong is refused: one", () => {
  it.each([
    ["that is missing", () => join(place.folder, "missing.json"), "there is no such file"],
    ["that is a folder", () => place.folder, "cannot be read"],
    ["over 5 MB", () => place.file("large.json", " ".repeat(5 * 1024 * 1024 + 1)), "at most 5242880 (5 MB)"],
    ["without content", () => place.file("empty.json", ""), "not valid JSON"],
    ["cut off", () => place.file("cut.json", altered('"session":', "")), "not valid JSON"],
    ["that is not UTF-8", () => place.file("latin.json", Uint8Array.of(0x7b, 0x22, 0xe9, 0x22, 0x3a, 0x31, 0x7d)), "not UTF-8"],
    ["that holds a list", () => place.file("list.json", "[]"), "no JSON object"],
    ["of another program", () => place.file("foreign.json", { format: "other.thing", version: 1 }), 'format is "other.thing"'],
    ["of a newer version", () => place.file("newer.json", altered('"version":1', '"version":2')), "version is 2, allowed: 1"],
    ["with an unknown key", () => place.file("key.json", altered('"notes":""', '"note":""')), "note is not a key"],
    ["with an unknown key of a part", () => place.file("key2.json", altered('"tap":0,', '"tap":0,"volts":3,')), "parts[0].volts"],
    ["with a key missing", () => place.file("gone.json", altered('"depthMm":12,', "")), "water.depthMm is missing, allowed: 0.5 to 200"],
    [
      "with a number out of range",
      () => place.file("range.json", altered('"depthMm":12', '"depthMm":201')),
      "water.depthMm is 201, allowed: 0.5 to 200",
    ],
    [
      "with a number that is not finite",
      () => place.file("infinite.json", altered('"volts":6', '"volts":1e999')),
      "supply.volts is Infinity",
    ],
    [
      "with a text for a number",
      () => place.file("text.json", altered('"volts":6', '"volts":"6"')),
      'supply.volts is "6", allowed: 0.001 to 1000',
    ],
    ["with an unknown shape", () => place.file("kind.json", altered('"kind":"ring"', '"kind":"star"')), '"bar", "disc", "ring"'],
    [
      "with a ring turned inside out",
      () => place.file("ring.json", altered('"innerMm":54', '"innerMm":64')),
      "parts[2].shape.innerMm is 64",
    ],
    ["with one id twice", () => place.file("twice.json", altered('"id":"B"', '"id":"A"')), 'parts[1].id is "A"'],
  ])("%s", (_, file, words) => {
    expect(refusal("solve", file(), "--quality", "live")).toContain(words);
  });

  it("with 65 parts", () => {
    const parts = Array.from({ length: 65 }, (_, index) => ({ ...barsWithLooseRing.parts[0], id: `P${index}` }));
    expect(refusal("check", place.file("many.json", { ...barsWithLooseRing, parts }))).toContain("at most 64 entries");
  });

  it("with several faults names them all, a line each", () => {
    const text = altered('"depthMm":12', '"depthMm":0').replace('"volts":6', '"volts":-6');
    const lines = refusal("check", place.file("several.json", text)).trimEnd().split("\n");
    expect(lines).toHaveLength(2);
    expect(lines[0]).toContain("water.depthMm is 0");
    expect(lines[1]).toContain("supply.volts is -6");
  });
});

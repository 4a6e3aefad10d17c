import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";
import { texts } from "../../../renderer/texts/texts";

const everyText = (value: unknown): string[] =>
  typeof value === "string" ? [value] : value !== null && typeof value === "object" ? Object.values(value).flatMap(everyText) : [];

it("every text of the catalogue says something and has no stray blanks", () => {
  const all = everyText(texts);
  expect(all.length).toBeGreaterThan(200);
  for (const text of all) {
    expect(text.trim()).toBe(text);
    expect(text).not.toBe("");
    expect(text).not.toMatch(/ {2}|\.\.\./);
  }
});

it("no panel writes its own words into the page", () => {
  const folder = fileURLToPath(new URL("../../../renderer/panels/", import.meta.url));
  const found = readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((name) => name.endsWith(".tsx"))
    .flatMap((name) => {
      const code = readFileSync(folder + name, "utf8").replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, "");
      const between = [...code.matchAll(/>\s*([A-Z][a-z]+ [^<>{}()=;]*)</g)].map(([, words]) => words);
      const attributes = [...code.matchAll(/(?:aria-label|title|label|placeholder)="([^"]+)"/g)].map(([, words]) => words);
      return [...between, ...attributes].filter((words) => !/^[xy]$/.test(words)).map((words) => `${name}: ${words}`);
    });
  expect(found).toEqual([]);
});

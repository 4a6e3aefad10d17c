import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, normalize, relative } from "node:path";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";

/** Who may know whom. A room may import from itself and from the rooms listed here. */
const ARROWS: Readonly<Record<string, readonly string[]>> = {
  "shared-types": [],
  "renderer/engine/geometry": ["shared-types"],
  "renderer/engine": ["shared-types", "renderer/engine/geometry"],
  "renderer/worker": ["shared-types", "renderer/engine"],
  "renderer/sheets": ["shared-types", "renderer/engine", "renderer/engine/geometry"],
  "renderer/document": ["shared-types", "renderer/texts"],
  "renderer/host": ["shared-types"],
  "renderer/canvas": ["shared-types", "renderer/document", "renderer/worker", "renderer/engine/geometry", "renderer/texts"],
  "renderer/panels": ["shared-types", "renderer/document", "renderer/worker", "renderer/engine/geometry", "renderer/texts"],
  "renderer/examples": ["shared-types"],
  "renderer/texts": ["shared-types"],
  electron: ["shared-types"],
};
/** Files, by the beginning of their path, that know more than their room: the headless command is the engine without a window. */
const COMPOSITION: Readonly<Record<string, readonly string[]>> = {
  "electron/headless": ["shared-types", "renderer/engine", "renderer/sheets"],
};
const ROOMS = Object.keys(ARROWS).sort((a, b) => b.length - a.length);

const root = fileURLToPath(new URL("..", import.meta.url));

function* sources(folder: string): Generator<string> {
  for (const entry of readdirSync(join(root, folder), { withFileTypes: true })) {
    const path = `${folder}/${entry.name}`;
    if (entry.isDirectory()) yield* sources(path);
    else if (/\.tsx?$/.test(entry.name) && !path.includes("/kernels/source/")) yield path;
  }
}

const roomOf = (path: string): string | null => ROOMS.find((room) => path === room || path.startsWith(`${room}/`)) ?? null;

function* importsOf(file: string): Generator<string> {
  const text = readFileSync(join(root, file), "utf8");
  for (const [, target] of text.matchAll(/(?:from|import)\s*\(?\s*["'](\.[^"']*)["']/g)) {
    yield relative(root, normalize(join(root, dirname(file), target)))
      .split("\\")
      .join("/");
  }
  for (const [, target] of text.matchAll(/new URL\(\s*["'](\.[^"']*)["']/g)) {
    yield relative(root, normalize(join(root, dirname(file), target)))
      .split("\\")
      .join("/");
  }
}

it("each room imports only from the rooms that it may know", () => {
  const broken: string[] = [];
  let looked = 0;
  for (const file of ["shared-types", "renderer", "electron"].flatMap((folder) => [...sources(folder)])) {
    const room = roomOf(file);
    if (room === null) continue;
    for (const target of importsOf(file)) {
      looked++;
      const other = roomOf(target);
      const composed = Object.keys(COMPOSITION).find((beginning) => file.startsWith(beginning));
      const mayKnow = composed === undefined ? ARROWS[room] : COMPOSITION[composed];
      if (other === null || other === room || mayKnow.includes(other)) continue;
      broken.push(`${file} imports ${target}`);
    }
  }
  expect(looked).toBeGreaterThan(100);
  expect(broken).toEqual([]);
});

it("the canvas and the panels never reach into the solver", () => {
  const reaching = ["renderer/canvas", "renderer/panels", "renderer/document", "renderer/host"]
    .flatMap((folder) => [...sources(folder)])
    .filter((file) => [...importsOf(file)].some((target) => target.startsWith("renderer/engine/field")));
  expect(reaching).toEqual([]);
});

it("the engine and the shared types know no page, no React and no Node", () => {
  const strangers: string[] = [];
  for (const file of ["shared-types", "renderer/engine"].flatMap((folder) => [...sources(folder)])) {
    const text = readFileSync(join(root, file), "utf8");
    for (const [, target] of text.matchAll(/from\s+["']([^."'][^"']*)["']/g)) {
      if (!/^(zod|@noble\/hashes)/.test(target)) strangers.push(`${file} imports ${target}`);
    }
    if (/\b(document|window|performance|Math\.random|Date\.now|process)\b[.(]/.test(text.replace(/\/\*[\s\S]*?\*\/|\/\/.*/g, ""))) {
      strangers.push(`${file} uses a page, a clock or chance`);
    }
  }
  expect(strangers).toEqual([]);
});

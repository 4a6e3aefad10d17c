import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { inRoot } from "./steps.mjs";

/**
 * The licences of what is bundled. Each bundle notes the packages that it really took something from; the packaging writes their licences
 * into one file beside the program.
 */

const notes = inRoot("dist", "licences");

/** @returns the folder of the package that a bundled file belongs to, or null for a file of our own. */
function packageFolder(file) {
  const match = /^(.*[\\/]node_modules[\\/](?:@[^\\/]+[\\/])?[^\\/]+)[\\/]/.exec(file.replace(/^\0/, "").split("?")[0]);
  return match === null ? null : match[1];
}

/** A plugin for the bundler that notes, under a bundle's name, whose code and fonts went into it. */
export function noteOrigins(name) {
  return {
    name: "note-origins",
    generateBundle(_options, bundle) {
      const files = Object.values(bundle).flatMap((made) =>
        made.type === "chunk" ? Object.keys(made.modules) : (made.originalFileNames ?? []),
      );
      const whole = files.map((file) => (file.startsWith("/") || /^[A-Z]:/.test(file) ? file : join(inRoot("renderer"), file)));
      const folders = [...new Set(whole.map(packageFolder).filter((folder) => folder !== null))].sort();
      mkdirSync(notes, { recursive: true });
      writeFileSync(join(notes, `${name}.json`), JSON.stringify(folders, null, 2));
    },
  };
}

function licenceText(folder) {
  const file = readdirSync(folder).find((name) => /^(licen[cs]e|copying)(\.(md|txt))?$/i.test(name));
  return file === undefined ? null : readFileSync(join(folder, file), "utf8").trim();
}

/** Writes the licences of everything that the bundles hold. @returns the path of the file, and the packages in it. */
export function writeNotices(names, target = inRoot("dist", "LICENCES.txt")) {
  const folders = names.flatMap((name) => JSON.parse(readFileSync(join(notes, `${name}.json`), "utf8")));
  const entries = [...new Set(folders)].map((folder) => {
    const { name, version, license = "see below" } = JSON.parse(readFileSync(join(folder, "package.json"), "utf8"));
    const text = licenceText(folder);
    return {
      name,
      version,
      text: `${name} ${version} (${license})\n\n${text ?? `Licensed under ${license}; the package carries no further text.`}`,
    };
  });
  entries.sort((a, b) => (a.name < b.name ? -1 : 1));
  const head = "Fieldtray holds parts of the following packages, with thanks. Electron's and Chromium's own licences lie beside this file.";
  mkdirSync(dirname(target), { recursive: true });
  writeFileSync(target, `${[head, ...entries.map(({ text }) => text)].join(`\n\n${"-".repeat(78)}\n\n`)}\n`);
  return { path: target, packages: entries.map(({ name }) => name) };
}

export const hasNotes = (names) => names.every((name) => existsSync(join(notes, `${name}.json`)));

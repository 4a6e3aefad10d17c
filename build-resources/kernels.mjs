import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { inRoot, say } from "./steps.mjs";

/**
 * Compiles the solver's kernels (AssemblyScript in `renderer/engine/field/kernels/source`) to WebAssembly, and writes the binary as text
 * into a module beside them, so that a worker's bundle, the headless command and the tests load it alike. Does nothing when it is fresh.
 */

const folder = inRoot("renderer", "engine", "field", "kernels");
const source = join(folder, "source");
const compiled = join(folder, "compiled.ts");
const OPTIONS = ["--runtime", "stub", "--enable", "simd", "-O3", "--noAssert", "--use", "abort="];

const sourceFiles = () =>
  readdirSync(source)
    .filter((name) => name.endsWith(".ts"))
    .sort();

function digestOfSources() {
  const hash = createHash("sha256").update(OPTIONS.join(" "));
  hash.update(readFileSync(inRoot("node_modules", "assemblyscript", "package.json")));
  for (const name of sourceFiles()) hash.update(name).update(readFileSync(join(source, name)));
  return hash.digest("hex");
}

/** Compiles the kernels when they are older than their sources. Rejects with the compiler's words where it cannot. */
export async function ensureKernels() {
  const digest = digestOfSources();
  if (existsSync(compiled) && readFileSync(compiled, "utf8").includes(digest)) return;
  const { main } = await import("assemblyscript/asc");
  let binary = null;
  const { error, stderr } = await main(["index.ts", "--baseDir", source, "--outFile", "kernels.wasm", ...OPTIONS], {
    readFile: (name, base) => (existsSync(join(base, name)) ? readFileSync(join(base, name), "utf8") : null),
    writeFile: (_name, contents) => {
      binary = contents;
    },
    listFiles: (name, base) => readdirSync(join(base, name)).filter((one) => one.endsWith(".ts")),
  });
  if (error || binary === null) throw new Error(`the kernels do not compile:\n${stderr}`);
  const text = [
    `/** Made by build-resources/kernels.mjs out of the files in \`source\` (${digest}): not to be edited. */`,
    `export const KERNELS = "${Buffer.from(binary).toString("base64")}";\n`,
  ].join("\n");
  // Several processes may do this at once: each swaps a whole file in.
  writeFileSync(`${compiled}.${process.pid}`, text);
  renameSync(`${compiled}.${process.pid}`, compiled);
}

/** Vitest calls this before all tests. */
export const setup = ensureKernels;

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    await ensureKernels();
  } catch (error) {
    say(error.message);
    process.exit(1);
  }
}

import { existsSync, readdirSync } from "node:fs";
import { builtinModules } from "node:module";
import { build } from "vite";
import { noteOrigins } from "./notices.mjs";
import { inRoot, run, say } from "./steps.mjs";

/** Builds everything that runs, or only the named parts: kernels, window, desktop process, preload and headless command, all into dist/. */

const nodeModules = [...builtinModules, ...builtinModules.map((name) => `node:${name}`), "electron"];

/** One bundle for Node without a node_modules folder beside it. */
async function bundleForNode(entry, outDir, fileName, format) {
  await build({
    configFile: false,
    plugins: [noteOrigins(fileName.split(".")[0])],
    root: inRoot("."),
    logLevel: "warn",
    resolve: {
      alias: ["html2canvas", "dompurify", "canvg"].map((name) => ({ find: name, replacement: inRoot("build-resources", "absent.js") })),
    },
    ssr: { noExternal: true, external: nodeModules },
    build: {
      ssr: inRoot(entry),
      outDir: inRoot("dist", outDir),
      emptyOutDir: false,
      target: "node20",
      minify: false,
      rollupOptions: { external: nodeModules, output: { format, entryFileNames: fileName, codeSplitting: false } },
    },
  });
}

const PARTS = {
  kernels: async () => {
    if (!existsSync(inRoot("build-resources", "kernels.mjs"))) return;
    const code = await run(process.execPath, [inRoot("build-resources", "kernels.mjs")]);
    if (code !== 0) process.exit(code);
  },
  window: () =>
    build({
      configFile: inRoot("renderer", "vite.config.ts"),
      logLevel: "warn",
      plugins: [noteOrigins("window")],
      worker: { plugins: () => [noteOrigins("worker")] },
    }),
  main: () => bundleForNode("electron/main.ts", "electron", "main.cjs", "cjs"),
  preload: () => bundleForNode("electron/preload.ts", "electron", "preload.cjs", "cjs"),
  headless: () => bundleForNode("electron/headless.ts", "headless", "headless.mjs", "es"),
};

/** Built only when named: what measures the program. */
const speedMeasures = existsSync(inRoot("tests", "speed"))
  ? readdirSync(inRoot("tests", "speed")).filter((name) => name.endsWith(".ts"))
  : [];
const ON_DEMAND = {
  ...Object.fromEntries(
    speedMeasures.map((file) => {
      const name = file.slice(0, -3);
      return [`speed/${name}`, () => bundleForNode(`tests/speed/${file}`, "speed", `${name}.mjs`, "es")];
    }),
  ),
  accuracy: () => bundleForNode("tests/reference/accuracy.ts", "accuracy", "accuracy.mjs", "es"),
};

const asked = process.argv.slice(2);
for (const [name, make] of Object.entries({ ...PARTS, ...ON_DEMAND })) {
  if (asked.length > 0 ? !asked.includes(name) : name in ON_DEMAND) continue;
  say(`building: ${name} …`);
  try {
    await make();
  } catch (error) {
    say(`the ${name} could not be built: ${error.message}`);
    process.exit(1);
  }
}

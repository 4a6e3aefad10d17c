import { existsSync } from "node:fs";
import { builtinModules } from "node:module";
import { build } from "vite";
import { inRoot, run, say } from "./steps.mjs";

/** Builds everything that runs: kernels, window, desktop process, preload and headless command, all into dist/. */

const nodeModules = [...builtinModules, ...builtinModules.map((name) => `node:${name}`), "electron"];

/** One bundle for Node without a node_modules folder beside it. */
async function bundleForNode(entry, outDir, fileName, format) {
  await build({
    configFile: false,
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

if (existsSync(inRoot("build-resources", "kernels.mjs"))) {
  const code = await run(process.execPath, [inRoot("build-resources", "kernels.mjs")]);
  if (code !== 0) process.exit(code);
}
if (existsSync(inRoot("renderer", "index.html"))) {
  say("bundling the window …");
  await build({ configFile: inRoot("renderer", "vite.config.ts"), logLevel: "warn" });
}
for (const [entry, fileName] of [
  ["electron/main.ts", "main.cjs"],
  ["electron/preload.ts", "preload.cjs"],
]) {
  if (existsSync(inRoot(entry))) await bundleForNode(entry, "electron", fileName, "cjs");
}
if (existsSync(inRoot("electron", "headless.ts"))) await bundleForNode("electron/headless.ts", "headless", "headless.mjs", "es");

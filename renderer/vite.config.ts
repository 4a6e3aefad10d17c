import { fileURLToPath } from "node:url";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vite";

/** The window's bundle: relative addresses, so that it is served alike from `app://`, from the local server and in tests. */
export default defineConfig({
  root: fileURLToPath(new URL(".", import.meta.url)),
  base: "./",
  plugins: [react()],
  resolve: {
    // jsPDF's doors to HTML pages and SVG files: nothing here goes through them.
    alias: ["html2canvas", "dompurify", "canvg"].map((name) => ({
      find: name,
      replacement: fileURLToPath(new URL("../build-resources/absent.js", import.meta.url)),
    })),
  },
  worker: { format: "es" },
  build: {
    outDir: fileURLToPath(new URL("../dist/renderer", import.meta.url)),
    emptyOutDir: true,
    target: "es2022",
    sourcemap: false,
    assetsInlineLimit: 0,
    chunkSizeWarningLimit: 1500,
  },
});

import { readFileSync } from "node:fs";
import path from "node:path";
import react from "@vitejs/plugin-react";
import { defineConfig } from "electron-vite";

const here = import.meta.dirname;
const from = (...parts: string[]) => path.join(here, ...parts);

/** The parts that run in Node or Electron's main process; each becomes dist/main/NAME.js. */
const mainEntries = {
  desktop: from("main/desktop/main.ts"),
  strake: from("main/cli/strake.ts"),
  "engine-process": from("main/engine/process/engine-process.ts"),
  worker: from("main/engine/worker.ts"),
};

// The command is run by its own name. A first line the source has is kept by the bundler; twice it would not parse.
const firstLine = "#!/usr/bin/env node";
const hasFirstLine = readFileSync(mainEntries.strake, "utf8").startsWith("#!");

export default defineConfig({
  main: {
    build: {
      outDir: "dist/main",
      // Electron's Node is newer; the command and the loopback door run in the oldest Node that is supported.
      target: "node20",
      externalizeDeps: true,
      rolldownOptions: {
        input: mainEntries,
        output: {
          format: "es",
          entryFileNames: "[name].js",
          chunkFileNames: "chunks/[name]-[hash].js",
          banner: (chunk) => (chunk.isEntry && chunk.name === "strake" && !hasFirstLine ? firstLine : ""),
        },
      },
    },
  },
  preload: {
    build: {
      outDir: "dist/preload",
      // A sandboxed preload is CommonJS and can require nothing but Electron: everything else is built into it.
      externalizeDeps: false,
      rolldownOptions: {
        input: { preload: from("main/desktop/preload.ts") },
        output: { format: "cjs", entryFileNames: "preload.cjs" },
      },
    },
  },
  renderer: {
    root: from("renderer"),
    plugins: [react()],
    build: {
      outDir: "dist/renderer",
      // The content policy allows no font or script inside an address: every asset stays a file.
      assetsInlineLimit: 0,
      minify: true,
      rolldownOptions: { input: from("renderer/index.html") },
    },
  },
});

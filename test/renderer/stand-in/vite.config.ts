import path from "node:path";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vite";

/** Serves the window over the stand-in engine: npx vite --config test/renderer/stand-in/vite.config.ts */
export default defineConfig({
  root: import.meta.dirname,
  plugins: [react()],
  build: { outDir: path.join(import.meta.dirname, "../../../out/stand-in"), emptyOutDir: true, assetsInlineLimit: 0 },
});

/** How the page is built: from viewer/ into dist/viewer/, plain files that the service hands out. */
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { defineConfig } from "vite";

const root = dirname(dirname(fileURLToPath(import.meta.url)));

export default defineConfig({
  root: join(root, "viewer"),
  base: "./",
  publicDir: false,
  oxc: { jsx: { runtime: "automatic", importSource: "preact" } },
  build: {
    target: "es2022",
    outDir: join(root, "dist/viewer"),
    emptyOutDir: true,
    // The three.js scene is loaded when there is heat to look at, not before.
    chunkSizeWarningLimit: 700,
    // The content security policy allows files of our own only, nothing inlined.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
  },
});

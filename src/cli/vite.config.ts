import { chmodSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { defineConfig, type Plugin } from "vite";

const root = new URL("../..", import.meta.url).pathname;
const outDir = join(root, "dist");

/** So that the built command runs from a clone, as it does once installed. */
function runBit(): Plugin {
  return { name: "run-bit", writeBundle: ({ dir }) => chmodSync(join(dir ?? outDir, "cli.js"), 0o755) };
}

/** The coast that `crosses-land` goes by (Natural Earth 1:10m, public domain), as a file beside the command. */
function coastline(): Plugin {
  return {
    name: "coastline",
    generateBundle() {
      const source = readFileSync(join(root, "node_modules/world-atlas/land-10m.json"));
      this.emitFile({ type: "asset", fileName: "coastline/land-10m.json", source });
    },
  };
}

/** Builds dist/cli.js (the command) and dist/index.js (the library), dependencies bundled, Node's own modules left out. */
export default defineConfig({
  root,
  publicDir: false,
  plugins: [coastline(), runBit()],
  ssr: { noExternal: true },
  build: {
    ssr: true,
    outDir,
    // The page is built into the same folder.
    emptyOutDir: false,
    target: "node20",
    rolldownOptions: {
      input: { cli: join(root, "src/cli/main.ts"), index: join(root, "src/index.ts") },
      output: {
        format: "es",
        entryFileNames: "[name].js",
        chunkFileNames: "chunks/[name].js",
        // A constant that becomes a variable is read anew at every use: the sweep takes a quarter longer.
        topLevelVar: false,
        minify: { mangle: false, compress: true, codegen: { removeWhitespace: true } },
      },
    },
  },
});

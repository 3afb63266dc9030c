import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { defineConfig, type Plugin } from "vite";
import { precache } from "./offline/precache.ts";

/*
 * Images may come from elsewhere only because a user may enter a tile address of their own; shell/tile-policy.ts narrows this to
 * that one origin, or to none, before anything is drawn.
 */
const POLICY = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "img-src 'self' data: blob: https: http:",
  "connect-src 'self'",
  "worker-src 'self'",
  "manifest-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
].join("; ");

/** Puts the policy first in the head of what is built; the development server needs inline scripts of its own. */
function contentPolicy(): Plugin {
  return {
    name: "content-policy",
    apply: "build",
    transformIndexHtml: () => [
      {
        tag: "meta",
        attrs: { "http-equiv": "Content-Security-Policy", content: POLICY },
        injectTo: "head-prepend",
      },
    ],
  };
}

/** Modules of Leaflet that the chart has no use for, and what stands in their place. */
const STUBS: ReadonlyMap<string, string> = new Map([
  ["./Canvas", "export const canvas = () => null;"],
  ["./SVG.VML", "export const vmlMixin = {}; export const vmlCreate = null;"],
  ["./Icon.Default", 'export { Icon as IconDefault } from "leaflet/src/layer/marker/Icon.js";'],
]);

/**
 * Leaves out of Leaflet what the chart has none of: paths on a canvas or in a browser without SVG, marker images of its own, and
 * the styles of those, of controls and of popups.
 */
function lessLeaflet(): Plugin {
  const unused = /leaflet-(control|popup|bar|oldie|default-icon-path)|\.lvml/;
  const stub = "\0leaflet-stub:";
  return {
    name: "less-leaflet",
    enforce: "pre",
    resolveId: (source, importer = "") =>
      STUBS.has(source) && importer.includes("leaflet/src/layer/") ? `${stub}${source}` : null,
    load: (id) => (id.startsWith(stub) ? (STUBS.get(id.slice(stub.length)) ?? null) : null),
    transform(code, id) {
      if (!id.includes("leaflet/dist/leaflet.css")) return null;
      const bare = code.replace(/\/\*[\s\S]*?\*\//g, "");
      return bare.replace(/([^{}]*)\{[^{}]*\}/g, (rule, selectors: string) =>
        selectors.split(",").every((selector) => unused.test(selector)) ? "" : rule,
      );
    },
  };
}

/** The parts of geographiclib-geodesic that solve for a line, from its own sources: its bundle brings areas of polygons too. */
function lessGeodesic(): Plugin {
  const parts = ["Math", "Geodesic", "GeodesicLine"].map((name) =>
    fileURLToPath(import.meta.resolve(`geographiclib-geodesic/src/${name}.js`)),
  );
  return {
    name: "less-geodesic",
    enforce: "pre",
    apply: "build",
    load(id) {
      if (!id.endsWith("/geographiclib-geodesic.min.js")) return null;
      const code = parts.map((path) => readFileSync(path, "utf8")).join("\n");
      return `${code}\nexport default geodesic;`;
    },
  };
}

/** The schemas of plan and craft without what they say of each key, which is for the JSON schemas alone: a sentence with a full stop. */
function lessSchema(): Plugin {
  return {
    name: "less-schema",
    enforce: "pre",
    apply: "build",
    transform: (code, id) =>
      /\/src\/plan\/[a-z-]+-schema\.ts$/.test(id)
        ? code.replace(/"[A-Z][^"\n]*\."|'[A-Z][^'\n]*\.'/g, '""')
        : null,
  };
}

/** What is loaded at once, as one file: apart, its parts would be packed and fetched one by one. */
const FIRST = {
  groups: [
    { name: "first", tags: ["$initial" as const], test: (id: string) => !id.includes("service-worker") },
  ],
};

export default defineConfig({
  root: new URL(".", import.meta.url).pathname,
  base: "./",
  plugins: [lessLeaflet(), contentPolicy(), precache()],
  resolve: {
    alias: [{ find: /^leaflet$/, replacement: new URL("chart/leaflet-parts.mjs", import.meta.url).pathname }],
  },
  worker: {
    format: "es",
    plugins: () => [lessGeodesic(), lessSchema()],
    // A constant that becomes a variable is read anew at every use: the sweep takes a quarter longer.
    rolldownOptions: { output: { codeSplitting: FIRST, topLevelVar: false } },
  },
  build: {
    outDir: new URL("../dist/page", import.meta.url).pathname,
    emptyOutDir: true,
    target: "es2022",
    // What is inlined could not be fetched under the policy.
    assetsInlineLimit: 0,
    // Parts that are loaded later need nothing preloaded for them, and the helper that would do it is part of the first load.
    modulePreload: false,
    rollupOptions: {
      input: {
        index: new URL("index.html", import.meta.url).pathname,
        "service-worker": new URL("worker/service-worker.ts", import.meta.url).pathname,
      },
      output: {
        codeSplitting: FIRST,
        // A service worker is found again by its address, and holds sway from its folder down.
        entryFileNames: ({ name }) => (name === "service-worker" ? "[name].js" : "assets/[name]-[hash].js"),
      },
    },
  },
});

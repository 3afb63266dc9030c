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

/**
 * Leaves out of Leaflet what the chart has none of: paths on a canvas, and the styles of controls, popups and its own marker
 * images.
 */
function lessLeaflet(): Plugin {
  const unused = /leaflet-(control|popup|bar|oldie|default-icon-path)|\.lvml/;
  const noCanvas = "\0no-canvas";
  return {
    name: "less-leaflet",
    enforce: "pre",
    resolveId: (source, importer = "") =>
      source === "./Canvas" && importer.includes("leaflet/src/layer/vector/") ? noCanvas : null,
    load: (id) => (id === noCanvas ? "export const canvas = () => null;" : null),
    transform(code, id) {
      if (!id.includes("leaflet/dist/leaflet.css")) return null;
      const bare = code.replace(/\/\*[\s\S]*?\*\//g, "");
      return bare.replace(/([^{}]*)\{[^{}]*\}/g, (rule, selectors: string) =>
        selectors.split(",").every((selector) => unused.test(selector)) ? "" : rule,
      );
    },
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
  worker: { format: "es", rolldownOptions: { output: { codeSplitting: FIRST } } },
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

import * as L from "leaflet";
import "leaflet/dist/leaflet.css";
import { CoastlineLayer, type TileSource } from "./coastline-layer.ts";
import { createGraticule } from "./graticule-layer.ts";

const MAX_ZOOM = 16;

export interface ChartMap {
  readonly map: L.Map;
  /** Draws everything anew in the theme's colours. */
  recolour(): void;
  /** Shows the user's own raster tiles, or none. */
  showTiles(address: string): Promise<void>;
  fineCoastReady(): void;
}

/** The map with coastline and graticule, still without a view; nothing on it is fetched from anywhere but the worker, unless the user says where from. */
export function createChartMap(element: HTMLElement, coast: TileSource, wantFine: () => void): ChartMap {
  const still = window.matchMedia("(prefers-reduced-motion: reduce)").matches;
  const map = L.map(element, {
    minZoom: 1,
    maxZoom: MAX_ZOOM,
    zoomControl: false,
    attributionControl: false,
    zoomSnap: 0.5,
    zoomAnimation: !still,
    fadeAnimation: false,
    inertia: !still,
    maxBounds: [
      [-85, -100000],
      [85, 100000],
    ],
  });
  addPane(map, "coast", 210);
  // Above the coast, which shows where a tile is missing.
  addPane(map, "tiles", 215);
  addPane(map, "shading", 220);
  addPane(map, "graticule", 230);
  addPane(map, "field", 240);

  addGestures(map);

  const coastline = new CoastlineLayer(coast, wantFine, {
    pane: "coast",
    maxNativeZoom: MAX_ZOOM,
    updateWhenZooming: false,
    keepBuffer: 1,
  }).addTo(map);
  const graticule = createGraticule().addTo(map);
  let tiles: L.TileLayer | null = null;
  let wanted = "";

  return {
    map,
    recolour() {
      coastline.refresh();
      graticule.redraw();
    },
    async showTiles(address) {
      wanted = address;
      tiles?.remove();
      tiles = null;
      if (address === "") return;
      // Part of Leaflet that few have a use for.
      const { tileLayer } = await import("leaflet/src/layer/tile/TileLayer.js");
      if (wanted !== address || tiles !== null) return;
      tiles = tileLayer(address, { maxZoom: MAX_ZOOM, pane: "tiles" }).addTo(map);
    },
    fineCoastReady: () => coastline.refresh(),
  };
}

/** Ways to zoom that only some have hands for: two fingers, and a box drawn with the Shift key down. */
function addGestures(map: L.Map): void {
  const touch = async () => {
    const { TouchZoom } = await import("leaflet/src/map/handler/Map.TouchZoom.js");
    // A map made after the first has it from the start.
    if (map.touchZoom === undefined) map.addHandler("touchZoom", TouchZoom);
  };
  const box = async () => {
    const { BoxZoom } = await import("leaflet/src/map/handler/Map.BoxZoom.js");
    if ((map.boxZoom as L.Handler | undefined) === undefined) map.addHandler("boxZoom", BoxZoom);
  };
  // Without a network there are other ways to zoom.
  const ifThere = (gesture: () => Promise<void>) => void gesture().catch(() => undefined);
  if (navigator.maxTouchPoints > 0) ifThere(touch);
  map.once("mousemove", () => ifThere(box));
}

function addPane(map: L.Map, name: string, zIndex: number): void {
  const pane = map.createPane(name);
  pane.style.zIndex = String(zIndex);
  pane.style.pointerEvents = "none";
}

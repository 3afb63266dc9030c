import * as L from "leaflet";
import { alongClass, alongColour, routeHue } from "../format/palette.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { turnsToward } from "./longitude.ts";
import { retracedLegs, toTheRight } from "./side-by-side.ts";

export interface DrawnRoute {
  readonly index: number;
  readonly name: string;
  readonly chosen: boolean;
  readonly drawing: RouteDrawing;
}

/** What the pointer does to a drawn route. `lat` and `lon` are where, on the copy of the world that was drawn. */
export interface RouteGestures {
  click(route: number, lat: number, lon: number): void;
  point(route: number, lat: number, lon: number): void;
  leave(): void;
}

/** Routes as they truly run: the route's own hue as a casing, the along-track component inside it. */
export class RouteLines {
  private readonly group: L.LayerGroup;
  private readonly map: L.Map;
  private readonly gestures: RouteGestures;

  constructor(map: L.Map, gestures: RouteGestures) {
    this.map = map;
    this.gestures = gestures;
    this.group = L.layerGroup().addTo(map);
  }

  draw(routes: readonly DrawnRoute[], limit: number): void {
    this.group.clearLayers();
    // The chosen route last, so that it lies above the others.
    const order = [...routes].sort((a, b) => Number(a.chosen) - Number(b.chosen));
    for (const route of order) this.drawRoute(route, limit);
  }

  private drawRoute({ index, name, chosen, drawing }: DrawnRoute, limit: number): void {
    const shift = shiftFor(this.map, drawing.lon);
    const line = latLngs(drawing.lat, drawing.lon, shift);
    const retraced = retracedLegs(drawing);
    // There and back over one leg are as far apart as their lines are wide.
    const shown = (part: L.LatLngTuple[], leg: number): L.LatLngTuple[] =>
      retraced.has(leg) ? this.besides(part, chosen ? 5 : 3.5) : part;
    const parts =
      retraced.size === 0 ? [line] : legParts(line, drawing).map((part, at) => shown(part, at + 1));
    for (const part of parts) {
      this.add(part, { color: "var(--casing)", weight: chosen ? 10 : 7, opacity: 0.9, interactive: false });
    }
    for (const part of parts) {
      this.add(part, {
        color: routeHue(index),
        weight: chosen ? 8 : 5,
        interactive: false,
        ...(drawing.profile ? {} : { dashArray: "6 6" }),
      });
    }
    if (drawing.profile) {
      for (const { from, to, leg, classNumber } of classRuns(drawing.profile, limit, retraced)) {
        const { lat, lon } = drawing.profile;
        const run = latLngs(lat.subarray(from, to + 1), lon.subarray(from, to + 1), shift);
        this.add(shown(run, leg), {
          color: alongColour(classNumber),
          weight: chosen ? 4 : 2.5,
          lineCap: "butt",
          interactive: false,
        });
      }
    }
    this.addHit(line, index, name, shift);
  }

  /** The wide, unseen line that the pointer finds. */
  private addHit(line: L.LatLngTuple[], index: number, name: string, shift: number): void {
    const hit = this.add(line, { weight: 26, opacity: 0, className: "route-hit" });
    hit.on("click", (event) => {
      L.DomEvent.stopPropagation(event);
      this.gestures.click(index, event.latlng.lat, event.latlng.lng - shift);
    });
    hit.on("mousemove", (event) => this.gestures.point(index, event.latlng.lat, event.latlng.lng - shift));
    hit.on("mouseout", () => this.gestures.leave());
    hit.once("mouseover", ({ latlng }) => void nameUnderPointer(hit, name, latlng));
  }

  /** A line moved to the right of its direction by so many px at this zoom. */
  private besides(line: readonly L.LatLngTuple[], px: number): L.LatLngTuple[] {
    const { map } = this;
    const points = line.map((place) => map.latLngToLayerPoint(place));
    return toTheRight(points, px).map(({ x, y }) => {
      const { lat, lng } = map.layerPointToLatLng([x, y]);
      return [lat, lng];
    });
  }

  private add(line: L.LatLngTuple[], options: L.PolylineOptions): L.Polyline {
    return L.polyline(line, { smoothFactor: 0.5, ...options }).addTo(this.group);
  }
}

/** Shows a route's name from now on while the pointer is over its line, as it is now. */
async function nameUnderPointer(hit: L.Polyline, name: string, at: L.LatLng): Promise<void> {
  let isOver = true;
  hit.once("mouseout", () => {
    isOver = false;
  });
  try {
    await import("leaflet/src/layer/Tooltip.js");
  } catch {
    // The ledger has the name too.
    return;
  }
  const look: L.TooltipOptions = { sticky: true, direction: "top", offset: [0, -8], className: "route-tip" };
  hit.bindTooltip(textElement(name), look);
  // Chromium lets Tab stop at a path that listens for focus, as a tooltip's does; the ledger is the keyboard's way to a route.
  hit.getElement()?.setAttribute("tabindex", "-1");
  if (isOver) hit.openTooltip(at);
}

/** Whole turns that bring a route to the copy of the world in view. */
export function shiftFor(map: L.Map, lon: ArrayLike<number>): number {
  const middle = ((lon[0] ?? 0) + (lon[lon.length - 1] ?? 0)) / 2;
  return turnsToward(middle, map.getCenter().lng);
}

/** Names from files are text, never markup. */
export function textElement(text: string): HTMLElement {
  const element = document.createElement("span");
  element.textContent = text;
  return element;
}

function latLngs(lat: Float64Array, lon: Float64Array, shift: number): L.LatLngTuple[] {
  return Array.from(lat, (each, at): L.LatLngTuple => [each, (lon[at] ?? 0) + shift]);
}

/** A route's line leg by leg. */
function legParts(line: readonly L.LatLngTuple[], { waypoints }: RouteDrawing): L.LatLngTuple[][] {
  return Array.from(waypoints.subarray(1), (to, at) => line.slice(waypoints[at], to + 1));
}

interface ClassRun {
  readonly from: number;
  readonly to: number;
  readonly leg: number;
  readonly classNumber: number;
}

/** Runs of samples of one class of the along-track component; a run ends with its leg where legs are drawn apart. */
function classRuns(
  { along_m_s: along, leg }: NonNullable<RouteDrawing["profile"]>,
  limit: number,
  apart: ReadonlySet<number>,
): ClassRun[] {
  const classAt = (at: number): number => alongClass(((along[at] ?? 0) + (along[at + 1] ?? 0)) / 2, limit);
  const legAt = (at: number): number => leg[at + 1] ?? 0;
  const runs: ClassRun[] = [];
  let from = 0;
  for (let at = 1; at < along.length; at += 1) {
    const parts = apart.has(legAt(at)) || apart.has(legAt(from));
    const ends =
      at === along.length - 1 || classAt(at) !== classAt(from) || (parts && legAt(at) !== legAt(from));
    if (!ends) continue;
    runs.push({ from, to: at, leg: legAt(from), classNumber: classAt(from) });
    from = at;
  }
  return runs;
}

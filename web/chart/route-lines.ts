import * as L from "leaflet";
import { alongClass, alongColour, routeHue } from "../format/palette.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { turnsToward } from "./longitude.ts";

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
    const line = latLngs(drawing.lat, drawing.lon, shift, 0, drawing.lat.length - 1);
    const hue = routeHue(index);
    this.add(line, { color: "var(--casing)", weight: chosen ? 10 : 7, opacity: 0.9, interactive: false });
    this.add(line, {
      color: hue,
      weight: chosen ? 8 : 5,
      interactive: false,
      ...(drawing.profile ? {} : { dashArray: "6 6" }),
    });
    if (drawing.profile) this.drawClasses(drawing.profile, shift, limit, chosen ? 4 : 2.5);
    const hit = this.add(line, { weight: 26, opacity: 0, className: "route-hit" });
    hit.on("click", (event) => {
      L.DomEvent.stopPropagation(event);
      this.gestures.click(index, event.latlng.lat, event.latlng.lng - shift);
    });
    hit.on("mousemove", (event) => this.gestures.point(index, event.latlng.lat, event.latlng.lng - shift));
    hit.on("mouseout", () => this.gestures.leave());
    hit.bindTooltip(textElement(name), {
      sticky: true,
      direction: "top",
      offset: [0, -8],
      className: "route-tip",
    });
    // Chromium lets Tab stop at a path that listens for focus, as a tooltip's does; the ledger is the keyboard's way to a route.
    hit.getElement()?.setAttribute("tabindex", "-1");
  }

  /** One line for each run of samples of one class. */
  private drawClasses(
    profile: NonNullable<RouteDrawing["profile"]>,
    shift: number,
    limit: number,
    weight: number,
  ) {
    const { along_m_s: along, lat, lon } = profile;
    const classAt = (at: number): number => alongClass(((along[at] ?? 0) + (along[at + 1] ?? 0)) / 2, limit);
    let from = 0;
    for (let at = 1; at < along.length; at += 1) {
      const ends = at === along.length - 1 || classAt(at) !== classAt(from);
      if (!ends) continue;
      this.add(latLngs(lat, lon, shift, from, at), {
        color: alongColour(classAt(from)),
        weight,
        lineCap: "butt",
        interactive: false,
      });
      from = at;
    }
  }

  private add(line: L.LatLngTuple[], options: L.PolylineOptions): L.Polyline {
    return L.polyline(line, { smoothFactor: 0.5, ...options }).addTo(this.group);
  }
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

function latLngs(
  lat: Float64Array,
  lon: Float64Array,
  shift: number,
  from: number,
  to: number,
): L.LatLngTuple[] {
  const line: L.LatLngTuple[] = [];
  for (let at = from; at <= to; at += 1) line.push([lat[at] ?? 0, (lon[at] ?? 0) + shift]);
  return line;
}

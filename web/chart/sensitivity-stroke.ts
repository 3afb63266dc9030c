import { effect } from "@preact/signals";
import * as L from "leaflet";
import type { SensitivityProfile } from "../core.ts";
import { placeAtDistance } from "../state/along-route.ts";
import type { PageState } from "../state/page-state.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { turnsToward } from "./longitude.ts";

/** Widths that a stroke takes, px. */
const WIDTHS = [0, 2, 4, 6, 9, 12, 15, 18] as const;

/** Along the chosen route, how much a wrong forecast there adds to the spread of the use: the wider the more. */
export function showSensitivity(
  map: L.Map,
  { desk, decisions, shown, store, answers }: PageState,
): () => void {
  const group = L.layerGroup().addTo(map);
  const draw = (): void => {
    group.clearLayers();
    if (!desk.sensitivity.value) return;
    const { route } = store.selection.value;
    const decided = decisions.decided.value;
    const drawing = answers.answer.value.drawings[route];
    const profile = decided?.plan === shown.value ? decided.sensitivities[route] : null;
    if (!drawing || !profile) return;
    const shift = turnsToward(drawing.lon[0] ?? 0, map.getCenter().lng);
    for (const { from_m, to_m, width } of strokes(profile)) {
      L.polyline(lineBetween(drawing, from_m, to_m, shift), {
        weight: width,
        color: "var(--ink)",
        opacity: 0.35,
        lineCap: "butt",
        interactive: false,
      }).addTo(group);
    }
  };
  const stop = effect(draw);
  map.on("moveend", draw);
  return () => {
    stop();
    map.off("moveend", draw);
  };
}

interface Stroke {
  readonly from_m: number;
  readonly to_m: number;
  readonly width: number;
}

/** Neighbouring cells of one width as one stroke. */
function strokes({ from_m, to_m, useVariance }: SensitivityProfile): Stroke[] {
  const density = Array.from(useVariance, (part, at) => {
    const length = (to_m[at] ?? 0) - (from_m[at] ?? 0);
    return length > 0 ? Math.max(part, 0) / length : null;
  });
  const most = Math.max(...density.map((value) => value ?? 0));
  if (!(most > 0)) return [];
  const found: Stroke[] = [];
  for (const [at, value] of density.entries()) {
    if (value === null) continue;
    const width = WIDTHS[Math.round((value / most) * (WIDTHS.length - 1))] ?? 0;
    const cell = { from_m: from_m[at] ?? 0, to_m: to_m[at] ?? 0, width };
    const last = found.at(-1);
    if (last?.width === width) found[found.length - 1] = { ...last, to_m: cell.to_m };
    else found.push(cell);
  }
  return found.filter(({ width }) => width > 0);
}

/** The drawn line between two distances. */
function lineBetween(drawing: RouteDrawing, from_m: number, to_m: number, shift: number): L.LatLngTuple[] {
  const inside: L.LatLngTuple[] = [];
  for (const [at, distance] of drawing.distance_m.entries()) {
    if (distance > from_m && distance < to_m)
      inside.push([drawing.lat[at] ?? 0, (drawing.lon[at] ?? 0) + shift]);
  }
  const end = (distance_m: number): L.LatLngTuple[] => {
    const place = placeAtDistance(drawing, distance_m);
    return place === null ? [] : [[place.lat, place.lon + shift]];
  };
  return [...end(from_m), ...inside, ...end(to_m)];
}

import { effect } from "@preact/signals";
import * as L from "leaflet";
import "leaflet/src/layer/Tooltip.js";
import { placeAtDistance } from "../state/along-route.ts";
import { addAlternate } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import { noReturns } from "../turn-back/turn-back-places.ts";
import { showAlternates } from "./alternate-handles.ts";
import { turnsToward } from "./longitude.ts";
import { rounded } from "./place-rounding.ts";
import { textElement } from "./route-lines.ts";
import { signElement, type TurnSign } from "./turn-sign.ts";

interface Mark {
  readonly kind: Exclude<TurnSign, "alternate">;
  readonly lat: number;
  readonly lon: number;
  readonly text: string;
}

/** Alternates, points of no return and equal-time points on the chart; a click sets an alternate where that was asked for. */
export function showTurnBack(map: L.Map, page: PageState): () => void {
  const group = L.layerGroup().addTo(map);
  const draw = (): void => {
    group.clearLayers();
    for (const mark of placeMarks(page)) drawMark(map, group, mark);
  };
  const stops = [effect(draw), addByClick(map, page), showAlternates(map, page)];
  map.on("moveend", draw);
  return () => {
    for (const stop of stops) stop();
    map.off("moveend", draw);
  };
}

/** Of the chosen route. */
function placeMarks({ routes, answers, store }: PageState): Mark[] {
  const at = store.selection.value.route;
  const turn = routes.value[at]?.turnBack;
  const drawing = answers.answer.value.drawings[at];
  if (turn === undefined || !drawing) return [];
  const placed = (kind: Mark["kind"], distance_m: number, text: string): Mark[] => {
    const place = placeAtDistance(drawing, distance_m);
    return place === null ? [] : [{ kind, lat: place.lat, lon: place.lon, text }];
  };
  return [
    ...turn.equalTime.flatMap(({ between: [a, b], place }) => {
      const names = [a, b].map((goal) => turn.goals[goal]?.name ?? "").join(", ");
      return placed("equal-time", place.distance_m, `Equal time: ${names}`);
    }),
    ...noReturns(turn).flatMap(({ goal, place }) =>
      placed("no-return", place.distance_m, `Point of no return: ${goal}`),
    ),
  ];
}

function drawMark(map: L.Map, group: L.LayerGroup, { kind, lat, lon, text }: Mark): void {
  const shift = turnsToward(lon, map.getCenter().lng);
  const icon = L.divIcon({ className: `turn-mark ${kind}`, iconSize: [18, 18], html: signElement(kind) });
  const marker = L.marker([lat, lon + shift], { icon, keyboard: false, interactive: true }).addTo(group);
  marker.bindTooltip(textElement(text), { direction: "right", className: "route-tip" });
}

/** A click sets an alternate where that was asked for; on the chart itself the Enter key does, at its middle. */
function addByClick(map: L.Map, { store, desk, view }: PageState): () => void {
  const add = ({ lat, lng }: L.LatLng): void => {
    if (!desk.placing.value) return;
    desk.placing.value = false;
    if (window.innerWidth < 700) view.pane.value = "decide";
    const place = rounded(lat, lng, map.getZoom());
    store.edit("Add alternate", (plan) => addAlternate(plan, place.lat, place.lon));
  };
  const onClick = ({ latlng }: L.LeafletMouseEvent): void => add(latlng);
  map.on("click", onClick);
  const host = map.getContainer();
  const onKey = (event: KeyboardEvent): void => {
    if (event.target === host && event.key === "Enter") add(map.getCenter());
    if (event.key === "Escape") desk.placing.value = false;
  };
  window.addEventListener("keydown", onKey);
  const stop = effect(() => {
    // One thing at a time is set by a click.
    if (desk.placing.value) view.adding.value = false;
    host.classList.toggle("placing", desk.placing.value);
  });
  return () => {
    map.off("click", onClick);
    window.removeEventListener("keydown", onKey);
    stop();
  };
}

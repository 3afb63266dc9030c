import { effect } from "@preact/signals";
import * as L from "leaflet";
import { withinTurn } from "../format/position-text.ts";
import { readPosition } from "../format/read-position.ts";
import { placeAtDistance } from "../state/along-route.ts";
import { addAlternate } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import { noReturns } from "../turn-back/turn-back-places.ts";
import { turnsToward } from "./longitude.ts";
import { textElement } from "./route-lines.ts";

interface Mark {
  readonly kind: "alternate" | "no-return" | "equal-time";
  readonly lat: number;
  readonly lon: number;
  readonly text: string;
}

/** Alternates, points of no return and equal-time points on the chart; a click sets an alternate where that was asked for. */
export function showTurnBack(map: L.Map, page: PageState): () => void {
  const group = L.layerGroup().addTo(map);
  const draw = (): void => {
    group.clearLayers();
    for (const mark of [...alternateMarks(page), ...placeMarks(page)]) drawMark(map, group, mark);
  };
  const stops = [effect(draw), addByClick(map, page)];
  map.on("moveend", draw);
  return () => {
    for (const stop of stops) stop();
    map.off("moveend", draw);
  };
}

function alternateMarks({ store }: PageState): Mark[] {
  return (store.plan.value.alternates ?? []).flatMap(({ name, lat, lon }): Mark[] => {
    try {
      return [{ kind: "alternate", ...readPosition(lat, lon), text: name }];
    } catch {
      // The plan's fault is said elsewhere.
      return [];
    }
  });
}

/** Those of the chosen route. */
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
  const icon = L.divIcon({ className: `turn-mark ${kind}`, iconSize: [18, 18], html: svgOf(kind) });
  const marker = L.marker([lat, lon + shift], { icon, keyboard: false, interactive: true }).addTo(group);
  marker.bindTooltip(textElement(text), {
    permanent: kind === "alternate",
    direction: "right",
    className: kind === "alternate" ? "route-tip alternate-name" : "route-tip",
  });
}

const SHAPES: Record<Mark["kind"], string> = {
  alternate: "M3 3H15V15H3ZM6 9H12M9 6V12",
  "no-return": "M9 1V17M9 1H1L9 8Z",
  "equal-time": "M9 2L16 9L9 16L2 9Z",
};

const SVG = "http://www.w3.org/2000/svg";

function svgOf(kind: Mark["kind"]): HTMLElement {
  const host = document.createElement("span");
  const svg = document.createElementNS(SVG, "svg");
  svg.setAttribute("viewBox", "0 0 18 18");
  for (const part of ["casing", "sign"]) {
    const path = document.createElementNS(SVG, "path");
    path.setAttribute("class", part);
    path.setAttribute("d", SHAPES[kind]);
    svg.append(path);
  }
  host.append(svg);
  return host;
}

function addByClick(map: L.Map, { store, desk, view }: PageState): () => void {
  const add = ({ latlng: { lat, lng } }: L.LeafletMouseEvent): void => {
    if (!desk.placing.value) return;
    desk.placing.value = false;
    if (window.innerWidth < 700) view.pane.value = "decide";
    const round = (degrees: number): number => Number(degrees.toFixed(4));
    store.edit("Add alternate", (plan) => addAlternate(plan, round(lat), round(withinTurn(lng))));
  };
  map.on("click", add);
  const host = map.getContainer();
  const onKey = (event: KeyboardEvent): void => {
    if (event.key === "Escape") desk.placing.value = false;
  };
  window.addEventListener("keydown", onKey);
  const stop = effect(() => {
    // One thing at a time is set by a click.
    if (desk.placing.value) view.adding.value = false;
    host.classList.toggle("placing", desk.placing.value);
  });
  return () => {
    map.off("click", add);
    window.removeEventListener("keydown", onKey);
    stop();
  };
}

import { effect, type Signal } from "@preact/signals";
import * as L from "leaflet";
import { shownUnit } from "../format/units.ts";
import { isTileAddress, letsIn } from "../shell/tile-policy.ts";
import { nearestSample, placeAtDistance, placeAtTime } from "../state/along-route.ts";
import { alongLimit } from "../state/along-scale.ts";
import { type PageState, shownInstant } from "../state/page-state.ts";
import { appendWaypoint, deleteWaypoint, insertWaypoint, placeWaypoint } from "../state/waypoint-edits.ts";
import type { FieldAt } from "../worker/protocol.ts";
import { readFields, showFields } from "./chart-fields.ts";
import { type ChartMap, createChartMap } from "./chart-map.ts";
import { fitClear, roomsBeside, whenBesideChanges } from "./chart-room.ts";
import { showDecidedLater } from "./decided-later.ts";
import { turnsToward } from "./longitude.ts";
import { Marks } from "./marks.ts";
import { rounded } from "./place-rounding.ts";
import type { ReadPlace } from "./read-place.ts";
import { followPlaceLater } from "./read-place-later.ts";
import { RouteLines, shiftFor } from "./route-lines.ts";
import { drawnRoutes, handlesOf, legMiddles } from "./route-view.ts";
import { WaypointHandles } from "./waypoint-handles.ts";

export interface ChartReadouts {
  /** Where the chart is read; `null` for nowhere. */
  readonly place: Signal<ReadPlace | null>;
  /** What the fields say there. */
  readonly under: Signal<readonly FieldAt[]>;
  readonly metresPerPx: Signal<number>;
  /** Where the shading's scale ends, m/s; `null` where nothing is shaded. */
  readonly shadingLimit: Signal<number | null>;
}

export interface ChartSession {
  zoom(steps: number): void;
  fitRoutes(): void;
  close(): void;
}

/** Joins the map to the page's state: what is in the plan is drawn, and what is done on the chart is done to the plan. */
export function openChart(host: HTMLElement, page: PageState, readouts: ChartReadouts): ChartSession {
  const chart = createChartMap(
    host,
    (z, x, y, detail) => page.engine.coastTile(z, x, y, detail),
    onceAtATime(() => page.engine.loadFineCoast().then(() => chart.fineCoastReady())),
  );
  const { map } = chart;
  const fitted = firstView(map, page);
  const closers = [
    followPlaceLater(map, page, readouts.place),
    measureScale(map, readouts.metresPerPx),
    showRoutes(map, page),
    showFields(map, page, readouts.shadingLimit),
    readFields(page, readouts.place, readouts.under),
    addByClick(map, page),
    followTheme(chart, page),
    showDecidedLater(map, page),
  ];
  const unsized = followSize(map, host);

  const fitRoutes = (): void => showAll(map, page);
  if (!fitted) closers.push(fitWhenFirstDrawn(page, fitRoutes));
  const untouched = fitUntilTouched(map, fitRoutes);
  closers.push(untouched, fitOpened(map, page));
  return {
    zoom(steps) {
      untouched();
      map.setZoom(map.getZoom() + steps);
    },
    fitRoutes,
    close() {
      unsized();
      for (const close of closers) close();
      map.remove();
    },
  };
}

/** How long a size has to last before the chart is drawn anew, ms. */
const SIZE_LASTS_MS = 250;

/** Redraws the chart once its size has come to rest: what opens beside it is shown first. */
function followSize(map: L.Map, host: HTMLElement): () => void {
  let timer: ReturnType<typeof setTimeout> | undefined;
  const sizes = new ResizeObserver(() => {
    clearTimeout(timer);
    timer = setTimeout(() => map.invalidateSize({ pan: false }), SIZE_LASTS_MS);
  });
  sizes.observe(host);
  return () => {
    clearTimeout(timer);
    sizes.disconnect();
  };
}

function showRoutes(map: L.Map, page: PageState): () => void {
  const { store, view, answers } = page;
  const lines = new RouteLines(map, {
    click(route, lat, lon) {
      const { value: chosen } = store.selection;
      const drawing = answers.answer.value.drawings[route];
      const at = drawing ? nearestSample(drawing, lat, lon) : null;
      if (view.adding.value && chosen.route === route && drawing && at !== null) {
        const leg = drawing.waypoints.findIndex((sample) => sample > at);
        insertAt(page, route, leg === -1 ? drawing.waypoints.length - 1 : leg, lat, lon, map.getZoom());
        store.settle();
      } else store.select({ route, waypoint: null });
    },
    point(route, lat, lon) {
      const drawing = answers.answer.value.drawings[route];
      const at = drawing ? nearestSample(drawing, lat, lon) : null;
      const distance_m = at === null ? undefined : drawing?.distance_m[at];
      if (distance_m !== undefined) view.pointed.value = { route, distance_m };
    },
    leave() {
      view.pointed.value = null;
    },
  });
  const handles = new WaypointHandles(map, {
    select: (waypoint) => store.select({ route: store.selection.value.route, waypoint }),
    move(index, lat, lon, done) {
      const { route } = store.selection.value;
      const place = rounded(lat, lon, map.getZoom());
      store.edit("Move waypoint", (plan) => placeWaypoint(plan, route, index, place.lat, place.lon), {
        merge: `move ${route} ${index}`,
        select: { route, waypoint: index },
      });
      if (done) store.settle();
    },
    insert(before, lat, lon) {
      insertAt(page, store.selection.value.route, before, lat, lon, map.getZoom());
    },
    remove(index) {
      const { route } = store.selection.value;
      store.edit("Delete waypoint", (plan) => deleteWaypoint(plan, route, index), {
        select: { route, waypoint: Math.max(index - 1, 0) },
      });
    },
  });
  const marks = new Marks(map);

  const draw = (): void => {
    const plan = store.plan.value;
    const answer = answers.answer.value;
    const { route, waypoint } = store.selection.value;
    const routes = drawnRoutes(plan, answer, route);
    lines.draw(routes, alongLimit(answer, shownUnit(view.units.value, "speed").si));
    const places = handlesOf(plan.routes[route]) ?? [];
    const shift = shiftFor(
      map,
      places.map(({ lon }) => lon),
    );
    handles.show(places, legMiddles(places, answer.drawings[route] ?? null), waypoint, shift);
  };
  const mark = (): void => {
    const answer = answers.answer.value;
    const instant = shownInstant(page);
    const { route: chosen } = store.selection.value;
    const crafts = answer.drawings.flatMap((drawing, route) => {
      const departure = answer.routes[route]?.departure;
      if (!drawing?.profile || departure === undefined || instant === null) return [];
      const place = placeAtTime(drawing.profile, (instant - Date.parse(departure)) / 1000);
      return place === null ? [] : [{ route, lat: place.lat, lon: place.lon, chosen: route === chosen }];
    });
    marks.showCrafts(crafts);
    const pointed = view.pointed.value;
    const line = pointed === null ? null : answer.drawings[pointed.route];
    marks.showPointed(line && pointed ? placeAtDistance(line, pointed.distance_m) : null);
  };
  const stops = [effect(draw), effect(mark)];
  // Panning past half a turn brings another copy of the world into view.
  const again = (): void => {
    draw();
    mark();
  };
  map.on("moveend", again);
  return () => {
    for (const stop of stops) stop();
    map.off("moveend", again);
  };
}

function insertAt(
  page: PageState,
  route: number,
  before: number,
  lat: number,
  lon: number,
  zoom: number,
): void {
  const place = rounded(lat, lon, zoom);
  page.store.edit("Insert waypoint", (plan) => insertWaypoint(plan, route, before, place), {
    merge: `move ${route} ${before}`,
    select: { route, waypoint: before },
  });
}

function addByClick(map: L.Map, page: PageState): () => void {
  const { store, view } = page;
  const add = ({ lat, lng }: L.LatLng): void => {
    if (!view.adding.value) return;
    const { route } = store.selection.value;
    const index = store.plan.value.routes[route]?.waypoints.length ?? 0;
    const place = rounded(lat, lng, map.getZoom());
    store.edit("Add waypoint", (plan) => appendWaypoint(plan, route, place), {
      select: { route, waypoint: index },
    });
  };
  map.on("click", (event) => add(event.latlng));
  const host = map.getContainer();
  const onKey = (event: KeyboardEvent): void => {
    if (event.target === host && event.key === "Enter") add(map.getCenter());
    if (event.key === "Escape") view.adding.value = false;
  };
  host.addEventListener("keydown", onKey);
  const stop = effect(() => {
    host.classList.toggle("adding", view.adding.value);
  });
  return () => {
    host.removeEventListener("keydown", onKey);
    stop();
  };
}

function measureScale(map: L.Map, metresPerPx: Signal<number>): () => void {
  const measure = (): void => {
    const { x, y } = map.getSize().divideBy(2);
    const left = map.containerPointToLatLng([x - 50, y]);
    metresPerPx.value = map.distance(left, map.containerPointToLatLng([x + 50, y])) / 100;
  };
  map.on("moveend resize", measure);
  measure();
  return () => map.off("moveend resize", measure);
}

function followTheme(chart: ChartMap, { view }: PageState): () => void {
  const dark = window.matchMedia("(prefers-color-scheme: dark)");
  const recolour = (): void => chart.recolour();
  let drawn = false;
  dark.addEventListener("change", recolour);
  const stops = [
    view.theme.subscribe(() => {
      // The theme's attribute is set by another effect; colours are read once it is.
      if (drawn) queueMicrotask(recolour);
      drawn = true;
    }),
    effect(() => {
      const { value: tiles } = view.tiles;
      void chart.showTiles(isTileAddress(tiles) && letsIn(tiles) ? tiles : "");
    }),
    effect(() => {
      const place = view.lookAt.value;
      if (place === null) return;
      const shift = turnsToward(place.lon, chart.map.getCenter().lng);
      chart.map.panInside([place.lat, place.lon + shift], roomsBeside(chart.map)[0]);
    }),
  ];
  return () => {
    dark.removeEventListener("change", recolour);
    for (const stop of stops) stop();
  };
}

function showAll(map: L.Map, { store, answers }: PageState): void {
  const points = drawnRoutes(store.plan.value, answers.answer.value, 0).flatMap(({ drawing }) => {
    const shift = shiftFor(map, drawing.lon);
    return Array.from(drawing.lat, (lat, at): L.LatLngTuple => [lat, (drawing.lon[at] ?? 0) + shift]);
  });
  if (points.length > 0) fitClear(map, L.latLngBounds(points));
}

/** Opens on the whole plan, or on the world where the plan is empty; says whether there was a plan to show. */
function firstView(map: L.Map, { store }: PageState): boolean {
  const places = store.plan.peek().routes.flatMap((route) => handlesOf(route) ?? []);
  const first = places[0]?.lon ?? 0;
  const points = places.map(({ lat, lon }): L.LatLngTuple => [lat, lon + turnsToward(lon, first)]);
  if (points.length < 2) map.setView([25, 0], 2);
  else fitClear(map, L.latLngBounds(points));
  return points.length >= 2;
}

/** Shows the whole of each plan that is opened, by its waypoints: its routes are yet to be drawn. */
function fitOpened(map: L.Map, page: PageState): () => void {
  return page.view.opened.subscribe((count) => {
    if (count > 0) firstView(map, page);
  });
}

/** Shows the whole of a plan once, when it is first there; afterwards the view is the user's. */
function fitWhenFirstDrawn(page: PageState, fitRoutes: () => void): () => void {
  let fitted = false;
  return effect(() => {
    const ready = page.store.plan.value.routes.some((route) => route.waypoints.length > 1);
    if (fitted || !ready) return;
    fitted = true;
    queueMicrotask(fitRoutes);
  });
}

/** Keeps the whole plan in view while the panes around the chart find their sizes, until the user takes hold of the chart. */
function fitUntilTouched(map: L.Map, fitRoutes: () => void): () => void {
  const host = map.getContainer();
  const gestures = ["pointerdown", "wheel", "keydown"];
  const stopBeside = whenBesideChanges(map, fitRoutes);
  const stop = (): void => {
    stopBeside();
    map.off("resize", fitRoutes);
    for (const gesture of gestures) host.removeEventListener(gesture, stop);
  };
  map.on("resize", fitRoutes);
  for (const gesture of gestures) host.addEventListener(gesture, stop);
  return stop;
}

function onceAtATime(run: () => Promise<void>): () => void {
  let running: Promise<void> | null = null;
  return () => {
    // After a failure the next zoom tries again; after success there is nothing left to do.
    if (running !== null) return;
    running = run().catch(() => {
      running = null;
    });
  };
}

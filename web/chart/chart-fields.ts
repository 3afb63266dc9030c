import { effect, type Signal } from "@preact/signals";
import type * as L from "leaflet";
import type { FieldRole } from "../core.ts";
import { withinTurn } from "../format/position-text.ts";
import { shownUnit } from "../format/units.ts";
import { latestWins, SUPERSEDED } from "../state/latest-wins.ts";
import { type PageState, shownInstant } from "../state/page-state.ts";
import { shownLevel } from "../state/page-view.ts";
import type { FieldAt, Lattice, LatticeQuestion, PlaceQuestion } from "../worker/protocol.ts";
import { createCoverage } from "./coverage-layer.ts";
import { type Area, areasOf } from "./field-areas.ts";
import { createShading, createSymbols, latticeFor, latticeLimit, type Shaded } from "./field-layer.ts";

const ROLES: readonly FieldRole[] = ["current", "wind"];

/** Shows the plan's fields at the chart's instant: symbols for each role, and shading for the one chosen. */
export function showFields(map: L.Map, page: PageState, shadingLimit: Signal<number | null>): () => void {
  const closers = ROLES.map((role) => showRole(map, page, role));
  closers.push(showShading(map, page, shadingLimit), showCoverage(map, page));
  return () => {
    for (const close of closers) close();
  };
}

function showRole(map: L.Map, page: PageState, role: FieldRole): () => void {
  let lattice: Lattice | null = null;
  const layer = createSymbols(() => lattice, role).addTo(map);
  return keepAsked(map, page, (instant, ask) => {
    const shown = (page.store.plan.value.fields ?? []).some((field) => field.role === role);
    const put = (found: Lattice | null): void => {
      lattice = found;
      layer.redraw();
    };
    if (!shown || instant === null) put(null);
    else
      void ask(latticeFor(map, role, instant, shownLevel(page.view), false)).then(
        (found) => found && put(found),
      );
  });
}

function showShading(map: L.Map, page: PageState, limit: Signal<number | null>): () => void {
  let shaded: Shaded | null = null;
  const layer = createShading(() => shaded).addTo(map);
  return keepAsked(map, page, (instant, ask) => {
    const role = page.view.shading.value;
    const present = (page.store.plan.value.fields ?? []).some((field) => field.role === role);
    const put = (found: typeof shaded): void => {
      shaded = found;
      limit.value = found?.limit_m_s ?? null;
      layer.redraw();
    };
    if (role === "none" || !present || instant === null) {
      put(null);
      return;
    }
    const step = latticeFor(map, role, instant, shownLevel(page.view), true);
    const { si } = shownUnit(page.view.units.value, "speed");
    void ask(step).then((lattice) => lattice && put({ lattice, step, limit_m_s: latticeLimit(lattice, si) }));
  });
}

/** Outlines the area of each field file, as far as it has been read. */
function showCoverage(map: L.Map, page: PageState): () => void {
  let areas: readonly Area[] = [];
  const layer = createCoverage(() => areas).addTo(map);
  return effect(() => {
    areas = areasOf(page.store.plan.value.fields ?? [], page.inspections.value);
    layer.redraw();
  });
}

/** Asks for the fields' values where the chart is read, at its instant and height. */
export function readFields(
  page: PageState,
  read: Signal<{ lat: number; lon: number } | null>,
  under: Signal<readonly FieldAt[]>,
): () => void {
  const newest = latestWins((question: PlaceQuestion) => page.engine.fieldsAt(question));
  return effect(() => {
    const place = read.value;
    const instant = shownInstant(page);
    const height_m = shownLevel(page.view);
    const { estimate } = page.answers.answer.value;
    if (place === null || instant === null || estimate === null) {
      under.value = [];
      return;
    }
    void newest({ lat: place.lat, lon: withinTurn(place.lon), height_m, instant }).then((found) => {
      if (found !== SUPERSEDED && read.peek() !== null) under.value = found;
    });
  });
}

type Ask = (question: LatticeQuestion) => Promise<Lattice | null>;

/** Runs now, when a signal that it reads changes, and when the map has moved; superseded answers are `null`. */
function keepAsked(map: L.Map, page: PageState, run: (instant: number | null, ask: Ask) => void): () => void {
  const newest = latestWins((question: LatticeQuestion) => page.engine.lattice(question));
  let runs = 0;
  const ask: Ask = async (question) => {
    const mine = runs;
    const found = await newest(question);
    // A later run may have had nothing to ask.
    return found === SUPERSEDED || mine !== runs ? null : found;
  };
  const again = (): void => {
    runs += 1;
    run(shownInstant(page), ask);
  };
  const stop = effect(() => {
    // A field can be drawn once the plan that names it is answered.
    page.answers.answer.value.estimate?.fields;
    again();
  });
  map.on("moveend resize", again);
  return () => {
    stop();
    map.off("moveend resize", again);
  };
}

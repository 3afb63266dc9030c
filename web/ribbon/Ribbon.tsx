import type { Profile, RouteEstimate } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { alongColour, routeHue } from "../format/palette.ts";
import { areaPath, linePath } from "../format/svg-path.ts";
import { inUnit, number, shownUnit, storeUnit } from "../format/units.ts";
import { LazyPart } from "../shell/LazyPart.tsx";
import { valueAtDistance } from "../state/along-route.ts";
import type { PageState } from "../state/page-state.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { axisOf, distanceAt } from "./along-axis.ts";
import { isDecided, isSpread, loadRibbonDecided, loadRibbonSpread } from "./decided-parts.ts";
import {
  BAND_BOTTOM,
  BAND_HEIGHT,
  BAND_TOP,
  NAMES_HEIGHT,
  REACH_STEP,
  STORE_HEIGHT,
  STORE_TOP,
  storeLevel,
} from "./ribbon-measures.ts";
import { ribbonRuns } from "./ribbon-runs.ts";
import { shownNames, type TickName } from "./tick-names.ts";

interface RibbonProps {
  readonly page: PageState;
  readonly route: number;
  readonly scale: LinearScale;
  readonly width: number;
  /** Where the colour scale ends, m/s. */
  readonly limit: number;
}

/** One route unrolled: the store left above, the along-track component as a band, waypoints as ticks. */
export function Ribbon({ page, route, scale, width, limit }: RibbonProps) {
  const { store, view, answers } = page;
  const document = store.plan.value.routes[route];
  const drawing = answers.answer.value.drawings[route] ?? null;
  const estimate = page.routes.value[route] ?? null;
  const chosen = store.selection.value.route === route;
  if (document === undefined) return null;

  const label = (
    <button
      type="button"
      class="ribbon-name"
      title={document.name}
      aria-pressed={chosen}
      onClick={() => store.select({ route, waypoint: null })}
    >
      <Swatch route={route} />
      <span>{document.name}</span>
    </button>
  );
  if (!drawing?.profile || estimate === null) {
    return (
      <div class="ribbon">
        {label}
        <p class="ribbon-none">Add waypoints on the chart or in the table.</p>
      </div>
    );
  }
  const { profile } = drawing;
  const byTime = view.axis.value === "time";
  const axis = axisOf(profile, byTime);
  const goals = estimate.turnBack?.goals.length ?? 0;
  // The goals but the destination, and a little air.
  const strips = chosen && goals > 0 ? (goals - 1) * REACH_STEP + 3 : 0;
  const pointed = view.pointed.value?.route === route ? view.pointed.value.distance_m : null;
  const point = (distance_m: number | null): void => {
    view.pointed.value = distance_m === null ? null : { route, distance_m };
  };
  return (
    <div class={chosen ? "ribbon chosen" : "ribbon"}>
      {label}
      <div
        class="ribbon-strip"
        role="slider"
        tabIndex={0}
        aria-label={`Place along ${document.name}`}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={Math.round((100 * (pointed ?? 0)) / (drawing.distance_m.at(-1) ?? 1))}
        aria-valuetext={placeText(page, drawing.profile, estimate, pointed ?? 0)}
        onPointerMove={(event) => point(distanceAt(profile, byTime, scale.invert(event.offsetX)))}
        onPointerLeave={() => point(null)}
        onFocus={() => point(pointed ?? 0)}
        onBlur={() => point(null)}
        onKeyDown={(event) => {
          const total = drawing.distance_m.at(-1) ?? 0;
          const next = keyTarget(event.key, event.shiftKey, pointed ?? 0, total);
          if (next === null) return;
          event.preventDefault();
          point(next);
        }}
        onClick={() => store.select({ route, waypoint: null })}
      >
        <svg width={width} height={BAND_BOTTOM + strips + NAMES_HEIGHT} aria-hidden="true">
          {isSpread(estimate) && (
            <LazyPart
              load={loadRibbonSpread}
              page={page}
              decided={estimate}
              drawing={drawing}
              scale={scale}
              under={true}
            />
          )}
          <StoreLine profile={drawing.profile} axis={axis} scale={scale} estimate={estimate} route={route} />
          <Band profile={drawing.profile} axis={axis} scale={scale} limit={limit} />
          <Ticks page={page} route={route} drawing={drawing} axis={axis} scale={scale} below={strips} />
          {isDecided(estimate) && (
            <LazyPart
              load={loadRibbonDecided}
              page={page}
              route={route}
              decided={estimate}
              drawing={drawing}
              scale={scale}
            />
          )}
          {pointed !== null && (
            <path
              class="ribbon-cursor"
              d={`M${scale(valueAtDistance(drawing.profile.distance_m, axis, pointed) ?? 0)} 0V${BAND_BOTTOM + 3}`}
            />
          )}
        </svg>
      </div>
    </div>
  );
}

export function Swatch({ route }: { readonly route: number }) {
  return (
    <svg class="swatch" width="12" height="12" aria-hidden="true">
      <circle cx="6" cy="6" r="5" fill={routeHue(route)} />
    </svg>
  );
}

function Band({
  profile,
  axis,
  scale,
  limit,
}: {
  profile: Profile;
  axis: Float64Array;
  scale: LinearScale;
  limit: number;
}) {
  const start = scale(axis[0] ?? 0);
  const end = scale(axis.at(-1) ?? 0);
  return (
    <g>
      {ribbonRuns(profile, axis, limit).map(({ from, to, classNumber }) => (
        <rect
          key={from}
          x={scale(from)}
          y={BAND_TOP}
          width={scale(to) - scale(from) + 0.4}
          height={BAND_HEIGHT}
          fill={alongColour(classNumber)}
        />
      ))}
      <rect
        class="ribbon-frame"
        x={start}
        y={BAND_TOP}
        width={Math.max(end - start, 0)}
        height={BAND_HEIGHT}
      />
    </g>
  );
}

interface StoreLineProps {
  readonly profile: Profile;
  readonly axis: Float64Array;
  readonly scale: LinearScale;
  readonly estimate: RouteEstimate;
  readonly route: number;
}

/** Store left, from full at the top to empty at the bottom, and the reserve that it must not fall below. */
function StoreLine({ profile, axis, scale, estimate, route }: StoreLineProps) {
  const bottom = STORE_TOP + STORE_HEIGHT;
  const level = (amount: number): number => storeLevel(amount, estimate.usable);
  const x = (at: number): number => scale(axis[at] ?? 0);
  const y = (at: number): number => level(profile.remaining[at] ?? 0);
  return (
    <g>
      <path class="store-fill" d={areaPath(axis.length, x, y, bottom)} />
      <path d={linePath(axis.length, x, y)} fill="none" stroke={routeHue(route)} stroke-width="1.8" />
      {estimate.reserve !== null && estimate.reserve > 0 && (
        <path
          class="store-reserve"
          d={`M${scale(axis[0] ?? 0)} ${level(estimate.reserve)}H${scale(axis.at(-1) ?? 0)}`}
        />
      )}
    </g>
  );
}

interface TicksProps {
  readonly page: PageState;
  readonly route: number;
  readonly drawing: RouteDrawing;
  readonly axis: Float64Array;
  readonly scale: LinearScale;
  /** Room that names leave below the band, px. */
  readonly below: number;
}

function Ticks({ page, route, drawing, axis, scale, below }: TicksProps) {
  const { profile } = drawing;
  const waypoints = page.store.plan.value.routes[route]?.waypoints ?? [];
  if (!profile) return null;
  const length = profile.distance_m.at(-1) ?? 0;
  const last = drawing.waypoints.length - 1;
  const ticks = Array.from(drawing.waypoints, (sample) => drawing.distance_m[sample] ?? 0).flatMap(
    (along, at): TickName[] => {
      if (along > length) return [];
      const x = scale(valueAtDistance(profile.distance_m, axis, along) ?? 0);
      const anchor = at === 0 ? "start" : at === last ? "end" : "middle";
      return [{ text: waypoints[at]?.name ?? String(at + 1), x, anchor }];
    },
  );
  const named = shownNames(ticks);
  return (
    <g class="ribbon-ticks">
      {ticks.map((tick, at) => (
        <g key={at} transform={`translate(${tick.x} ${BAND_TOP})`}>
          <path d={`M0 -2V${BAND_HEIGHT + 3}`} />
          {named.has(tick) && (
            <text y={BAND_HEIGHT + below + 13} text-anchor={tick.anchor}>
              {tick.text}
            </text>
          )}
        </g>
      ))}
    </g>
  );
}

/** Where a key leads: arrows by a hundredth of the route, with Shift by a thousandth. */
export function keyTarget(key: string, fine: boolean, from: number, total: number): number | null {
  const step = total * (fine ? 0.001 : 0.01);
  const target: Record<string, number> = {
    ArrowRight: from + step,
    ArrowUp: from + step,
    ArrowLeft: from - step,
    ArrowDown: from - step,
    PageUp: from + 10 * step,
    PageDown: from - 10 * step,
    Home: 0,
    End: total,
  };
  const found = target[key];
  return found === undefined ? null : Math.min(Math.max(found, 0), total);
}

/** The figures at a place, for those who hear the ribbon. */
export function placeText(
  { view }: PageState,
  profile: Profile,
  estimate: RouteEstimate,
  distance_m: number,
): string {
  const units = view.units.value;
  const speed = shownUnit(units, "speed");
  const at = (values: Float64Array): number => valueAtDistance(profile.distance_m, values, distance_m) ?? 0;
  const distance = shownUnit(units, "distance");
  const amount = storeUnit(estimate.storeUnit, estimate.usable);
  const along = at(profile.along_m_s);
  return [
    `${inUnit(distance_m, distance)} ${distance.symbol}`,
    `${number(Math.abs(along) / speed.si, speed.decimals)} ${speed.symbol} ${along < 0 ? "against" : "with"}`,
    `ground speed ${inUnit(at(profile.groundSpeed_m_s), speed)} ${speed.symbol}`,
    `${inUnit(at(profile.remaining), amount)} ${amount.symbol} left`,
  ].join(", ");
}

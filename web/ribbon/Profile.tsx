import type { RouteEstimate } from "../core.ts";
import { linearScale } from "../format/linear-scale.ts";
import { areaPath, linePath } from "../format/svg-path.ts";
import { inUnit, signedInUnit } from "../format/units.ts";
import { useWidth } from "../shell/use-width.ts";
import { valueAtDistance } from "../state/along-route.ts";
import type { PageState } from "../state/page-state.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { AlongAxis } from "./AlongAxis.tsx";
import { alongScale, axisOf, distanceAt, farthest } from "./along-axis.ts";
import { type ProfileTrack, profileTracks } from "./profile-tracks.ts";
import { keyTarget, placeText } from "./Ribbon.tsx";

const INSET = 3;
/** Height of a track, px: on a narrow screen the profile has the pane to itself. */
const LOW = 34;
const TALL = 72;
const NARROW = 420;

/** The chosen route's figures along its way, on the ribbons' axis and pointed at as they are. */
export function Profile({ page }: { readonly page: PageState }) {
  const { store, answers } = page;
  const { route } = store.selection.value;
  const drawing = answers.answer.value.drawings[route] ?? null;
  const estimate = answers.answer.value.routes[route] ?? null;
  if (drawing === null || estimate === null || drawing.profile === null) return null;
  return <Tracks page={page} route={route} drawing={drawing} estimate={estimate} />;
}

interface TracksProps {
  readonly page: PageState;
  readonly route: number;
  readonly drawing: RouteDrawing;
  readonly estimate: RouteEstimate;
}

function Tracks({ page, route, drawing, estimate }: TracksProps) {
  const { ref, width } = useWidth<HTMLDivElement>(640);
  const { view, answers } = page;
  const { profile } = drawing;
  if (profile === null) return null;
  const byTime = view.axis.value === "time";
  const axis = axisOf(profile, byTime);
  const end = farthest(answers.answer.value, byTime);
  const scale = alongScale(end, width);
  const pointed = view.pointed.value?.route === route ? view.pointed.value.distance_m : null;
  const point = (distance_m: number | null): void => {
    view.pointed.value = distance_m === null ? null : { route, distance_m };
  };
  const total = profile.distance_m.at(-1) ?? 0;
  const cursor = pointed === null ? null : scale(valueAtDistance(profile.distance_m, axis, pointed) ?? 0);
  const tracks = profileTracks(profile, estimate, view.units.value);
  const height = width < NARROW ? TALL : LOW;
  const waypoints = Array.from(drawing.waypoints, (sample) => drawing.distance_m[sample] ?? 0)
    .filter((along) => along <= total)
    .map((along) => scale(valueAtDistance(profile.distance_m, axis, along) ?? 0));
  return (
    <div
      class="profile"
      role="slider"
      tabIndex={0}
      aria-label={`Profile of ${estimate.name}`}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={Math.round((100 * (pointed ?? 0)) / Math.max(total, 1e-9))}
      aria-valuetext={placeText(page, profile, estimate, pointed ?? 0)}
      onFocus={() => point(pointed ?? 0)}
      onBlur={() => point(null)}
      onKeyDown={(event) => {
        const next = keyTarget(event.key, event.shiftKey, pointed ?? 0, total);
        if (next === null) return;
        event.preventDefault();
        point(next);
      }}
      onPointerLeave={() => point(null)}
    >
      <div ref={ref} class="ribbon-measure" aria-hidden="true" />
      {tracks.map((track) => (
        <div key={track.key} class="profile-track" aria-hidden="true">
          <p>
            <span>{track.name}</span>
            <b>{figureAt(track, profile.distance_m, pointed)}</b>
          </p>
          <div
            class="profile-strip"
            onPointerMove={(event) => point(distanceAt(profile, byTime, scale.invert(event.offsetX)))}
          >
            <svg width={width} height={height} aria-hidden="true">
              {waypoints.map((x, at) => (
                <path key={at} class="profile-waypoint" d={`M${x} 0V${height}`} />
              ))}
              <Track track={track} axis={axis} scale={scale} height={height} />
              {cursor !== null && <path class="ribbon-cursor" d={`M${cursor} 0V${height}`} />}
            </svg>
          </div>
        </div>
      ))}
      <AlongAxis page={page} scale={scale} end={end} width={width} />
    </div>
  );
}

interface TrackProps {
  readonly track: ProfileTrack;
  readonly axis: Float64Array;
  readonly scale: ReturnType<typeof alongScale>;
  readonly height: number;
}

function Track({ track, axis, scale, height }: TrackProps) {
  const { values, low, high, signed, bound } = track;
  const y = linearScale([low, high], [height - INSET, INSET]);
  const x = (at: number): number => scale(axis[at] ?? 0);
  const level = (at: number): number => y(values[at] ?? 0);
  const base = y(Math.max(0, low));
  const zero = y(0);
  const end = scale(axis.at(-1) ?? 0);
  const start = scale(axis[0] ?? 0);
  return (
    <g class={`profile-${track.key}`}>
      <path class="profile-zero" d={`M${start} ${zero}H${end}`} />
      <path class="profile-fill" d={areaPath(axis.length, x, level, signed ? zero : base)} />
      <path class="profile-line" d={linePath(axis.length, x, level)} />
      {bound !== null && <path class="store-reserve" d={`M${start} ${y(bound)}H${end}`} />}
    </g>
  );
}

/** The figure at the place pointed at, else its least and greatest. */
function figureAt(
  { values, unit, signed }: ProfileTrack,
  distances: Float64Array,
  at: number | null,
): string {
  const text = signed ? signedInUnit : inUnit;
  if (at !== null) return `${text(valueAtDistance(distances, values, at), unit)} ${unit.symbol}`;
  const least = text(Math.min(...values), unit);
  const most = text(Math.max(...values), unit);
  return least === most ? `${least} ${unit.symbol}` : `${least} … ${most} ${unit.symbol}`;
}

import type { DecidedRoute } from "../core.ts";
import { type LinearScale, linearScale } from "../format/linear-scale.ts";
import { routeHue } from "../format/palette.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { SpreadBox, type SpreadKind } from "../ribbon/SpreadBand.tsx";
import { SpreadKey } from "../ribbon/SpreadLegend.tsx";
import "./sure-view.css";
import { type Between, errorBetween, membersBetween, onArrival } from "../ribbon/spread-between.ts";
import { useWidth } from "../shell/use-width.ts";
import type { PageState } from "../state/page-state.ts";

const HEIGHT = 26;
/** Room at the ends of the scale, px. */
const AIR = 10;

interface Gauge {
  readonly route: DecidedRoute;
  readonly at: number;
  readonly left: number | null;
  readonly error: Between | null;
  readonly members: Between | null;
}

/**
 * What is left of every route on arrival, with the reserve: on one scale from the least to the most that may come, since on the
 * ribbons' from full to empty the bands are thin.
 */
export function SpreadGauges({ page }: { readonly page: PageState }) {
  const { ref, width } = useWidth<HTMLTableCellElement>(200);
  const gauges = page.routes.value.flatMap((route, at) => (route === null ? [] : gaugeOf(route, at)));
  const [first] = gauges;
  if (first === undefined) return null;
  const amount = storeUnit(first.route.storeUnit, first.route.usable);
  const words = (between: Between | null): string =>
    between === null ? "–" : `${inUnit(between.low, amount)} to ${inUnit(between.high, amount)}`;
  const scale = scaleOf(gauges, width);
  const hasError = gauges.some(({ error }) => error !== null);
  const hasMembers = gauges.some(({ members }) => members !== null);
  return (
    <table class="spread-gauges">
      <caption>Left on arrival, {amount.symbol}; bands from 10 % to 90 %</caption>
      <thead>
        <tr>
          <th scope="col">Route</th>
          <th scope="col">Left</th>
          {hasError && (
            <th scope="col">
              <SpreadKey kind="error" /> Stated error
            </th>
          )}
          {hasMembers && (
            <th scope="col">
              <SpreadKey kind="ensemble" /> Members
            </th>
          )}
          <th scope="col">Reserve</th>
          <td ref={ref} aria-hidden="true" />
        </tr>
      </thead>
      <tbody>
        {gauges.map((gauge) => (
          <tr key={gauge.at}>
            <th scope="row">
              <Swatch route={gauge.at} /> {gauge.route.name}
            </th>
            <td class="figure">{inUnit(gauge.left, amount)}</td>
            {hasError && <td class="figure">{words(gauge.error)}</td>}
            {hasMembers && <td class="figure">{words(gauge.members)}</td>}
            <td class="figure">{inUnit(gauge.route.reserve, amount)}</td>
            <td class="gauge" aria-hidden="true">
              <GaugePicture gauge={gauge} scale={scale} width={width} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Nothing of a route of which nothing is known how sure it is. */
function gaugeOf(route: DecidedRoute, at: number): Gauge[] {
  if (route.spread == null && route.ensemble === undefined) return [];
  const left = route.totals.remaining;
  const error = onArrival(route, errorBetween(route));
  return [{ route, at, left, error, members: onArrival(route, membersBetween(route)) }];
}

function scaleOf(gauges: readonly Gauge[], width: number): LinearScale {
  const all = gauges.flatMap(({ left, error, members, route: { reserve } }) =>
    [left, reserve, error?.low, error?.high, members?.low, members?.high].flatMap((value) => value ?? []),
  );
  const from = Math.min(...all);
  const to = Math.max(...all);
  return linearScale([from, to > from ? to : from + 1], [AIR, Math.max(width - AIR, AIR + 1)]);
}

interface GaugePictureProps {
  readonly gauge: Gauge;
  readonly scale: LinearScale;
  readonly width: number;
}

function GaugePicture({ gauge: { left, error, members, route, at }, scale, width }: GaugePictureProps) {
  const band = (kind: SpreadKind, between: Between | null, y: number) =>
    between === null ? null : (
      <SpreadBox
        kind={kind}
        x={scale(between.low)}
        y={y}
        width={scale(between.high) - scale(between.low)}
        height={8}
      />
    );
  return (
    <svg width={width} height={HEIGHT} aria-hidden="true">
      {band("error", error, 4)}
      {band("ensemble", members, 14)}
      {left !== null && (
        <path class="gauge-left" stroke={routeHue(at)} d={`M${scale(left)} 2V${HEIGHT - 2}`} />
      )}
      {route.reserve !== null && route.reserve > 0 && (
        <path class="store-reserve" d={`M${scale(route.reserve)} 0V${HEIGHT}`} />
      )}
    </svg>
  );
}

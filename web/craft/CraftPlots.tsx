import type { StillCurve, StillPoint } from "../core.ts";
import { linearScale } from "../format/linear-scale.ts";
import { linePath } from "../format/svg-path.ts";
import { durationText } from "../format/time-text.ts";
import { inUnit, number, rateUnit, type ShownUnit, shownUnit, storeUnit } from "../format/units.ts";
import { useWidth } from "../shell/use-width.ts";
import type { UnitsPreset } from "../state/page-view.ts";
import type { CraftAnswer } from "../worker/protocol.ts";

type Study = Extract<CraftAnswer, { readonly ok: true }>;

interface CraftPlotsProps {
  readonly study: Study | null;
  readonly units: UnitsPreset;
}

/** What the craft spends against its speed in a still medium: per time, and per distance. */
export function CraftPlots({ study, units }: CraftPlotsProps) {
  const { ref, width } = useWidth<HTMLDivElement>(380);
  const curve = study?.curve ?? null;
  return (
    <div>
      <div ref={ref} />
      {study === null && <p class="quiet">The curve is drawn once the form is in order.</p>}
      {study !== null && curve === null && (
        <p class="quiet">Nothing bounds the speed: give an ordered speed, or the least and greatest.</p>
      )}
      {study !== null && curve !== null && (
        <>
          <Plot
            {...{ study, curve, units, width }}
            title={curve.storeUnit === "J" ? "Power, hotel load included" : "Rate, hotel load included"}
            values={curve.usePerSecond}
            unit={rateUnit(curve.storeUnit, Math.max(...curve.usePerSecond))}
            of={(point) => point.usePerSecond}
          />
          <Plot
            {...{ study, curve, units, width }}
            title={curve.storeUnit === "J" ? "Energy for the distance" : "Fuel for the distance"}
            values={curve.usePerMetre}
            unit={perDistance(curve, units)}
            of={(point) => point.usePerMetre}
          />
          <PlotKey study={study} />
          <Figures study={study} curve={curve} units={units} />
        </>
      )}
    </div>
  );
}

const HEIGHT = 176;
const LEFT = 52;
const RIGHT = 12;
const TOP = 10;
const BOTTOM = 32;

interface PlotProps {
  readonly study: Study;
  readonly curve: StillCurve;
  readonly units: UnitsPreset;
  readonly width: number;
  readonly title: string;
  readonly values: Float64Array;
  readonly unit: ShownUnit;
  readonly of: (point: StillPoint) => number;
}

function Plot({ study, curve, units, width, title, values, unit, of }: PlotProps) {
  const speed = shownUnit(units, "speed");
  const { speed_m_s: speeds, range } = curve;
  const x = linearScale([0, (speeds.at(-1) ?? 1) / speed.si], [LEFT, width - RIGHT]);
  const y = linearScale([0, heightOf(values, unit)], [HEIGHT - BOTTOM, TOP]);
  const at = (v: number): number => x(v / speed.si);
  const high = (value: number): number => y(value / unit.si);
  const path = linePath(
    speeds.length,
    (n) => at(speeds[n] ?? 0),
    (n) => high(values[n] ?? 0),
  );
  const floor = HEIGHT - BOTTOM;
  const { point, least, limit } = study;
  return (
    <figure>
      <figcaption>
        {title}, {unit.symbol}
      </figcaption>
      <svg width={width} height={HEIGHT} aria-hidden="true">
        {range !== null && (
          <rect
            class="plot-range"
            x={at(Math.max(range.min, speeds[0] ?? 0))}
            width={Math.max(
              at(Math.min(range.max, speeds.at(-1) ?? 0)) - at(Math.max(range.min, speeds[0] ?? 0)),
              0,
            )}
            y={TOP}
            height={floor - TOP}
          />
        )}
        {y.ticks(4).map((tick) => (
          <g key={tick} class="plot-tick">
            <path d={`M${LEFT} ${y(tick)}H${width - RIGHT}`} />
            <text x={LEFT - 6} y={y(tick) + 4} text-anchor="end">
              {Number(tick.toPrecision(4))}
            </text>
          </g>
        ))}
        {x.ticks(6).map((tick) => (
          <text key={tick} class="plot-speed" x={x(tick)} y={floor + 15} text-anchor="middle">
            {tick}
          </text>
        ))}
        <text class="plot-speed" x={width - RIGHT} y={HEIGHT - 3} text-anchor="end">
          through speed, {speed.symbol}
        </text>
        {limit !== null && <path class="plot-limit" d={`M${at(limit)} ${TOP}V${floor}`} />}
        <svg
          y={TOP}
          width={width}
          height={floor - TOP}
          viewBox={`0 ${TOP} ${width} ${floor - TOP}`}
          aria-hidden="true"
        >
          <path class="plot-curve" d={path} />
        </svg>
        {point !== null && <path class="plot-pace" d={`M${at(point.speed_m_s)} ${TOP}V${floor}`} />}
        {least !== null && <circle class="plot-least" cx={at(least.speed_m_s)} cy={high(of(least))} r="5" />}
        {point !== null && (
          <circle class="plot-point" cx={at(point.speed_m_s)} cy={high(of(point))} r="4.5" />
        )}
      </svg>
    </figure>
  );
}

function PlotKey({ study }: { readonly study: Study }) {
  return (
    <p class="plot-key" aria-hidden="true">
      <Key kind="pace">pace</Key>
      {study.least !== null && <Key kind="least">least for the distance</Key>}
      {study.curve?.range != null && <Key kind="range">range of speeds</Key>}
      {study.limit !== null && <Key kind="limit">least ground speed</Key>}
    </p>
  );
}

interface KeyProps {
  readonly kind: "pace" | "least" | "range" | "limit";
  readonly children: string;
}

function Key({ kind, children }: KeyProps) {
  return (
    <span>
      <svg width="14" height="12" aria-hidden="true">
        {kind === "pace" && <circle class="plot-point" cx="7" cy="6" r="4.5" />}
        {kind === "least" && <circle class="plot-least" cx="7" cy="6" r="4.5" />}
        {kind === "range" && <rect class="plot-range" width="14" height="12" />}
        {kind === "limit" && <path class="plot-limit" d="M7 0V12" />}
      </svg>{" "}
      {children}
    </span>
  );
}

/** The marked speeds in figures. */
function Figures({ study, curve, units }: { study: Study; curve: StillCurve; units: UnitsPreset }) {
  const speed = shownUnit(units, "speed");
  const distance = shownUnit(units, "distance");
  const rate = rateUnit(curve.storeUnit, Math.max(...curve.usePerSecond));
  const per = perDistance(curve, units);
  const rows = [
    { name: "At the pace", point: study.point },
    { name: "Least for the distance", point: study.least },
  ];
  return (
    <>
      <table class="craft-figures">
        <thead>
          <tr>
            <th scope="col">Still medium</th>
            <th scope="col" class="figure">
              {speed.symbol}
            </th>
            <th scope="col" class="figure">
              {rate.symbol}
            </th>
            <th scope="col" class="figure">
              {per.symbol}
            </th>
            <th scope="col" class="figure">
              Store lasts
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(
            ({ name, point }) =>
              point !== null && (
                <tr key={name}>
                  <th scope="row">{name}</th>
                  <td class="figure">{inUnit(point.speed_m_s, speed)}</td>
                  <td class="figure">{inUnit(point.usePerSecond, rate)}</td>
                  <td class="figure">{significant(point.usePerMetre / per.si)}</td>
                  <td class="figure">
                    {inUnit(point.range_m, distance)} {distance.symbol}, {durationText(point.endurance_s)}
                  </td>
                </tr>
              ),
          )}
        </tbody>
      </table>
      {study.paceFault !== null && <p class="field-fault">{study.paceFault}</p>}
      {study.paceFault === null && study.point === null && (
        <p class="quiet">The pace finds no speed here for which the power model has a value.</p>
      )}
    </>
  );
}

/** Amounts of the store for a unit of distance. */
function perDistance({ storeUnit: unit, usePerMetre }: StillCurve, units: UnitsPreset): ShownUnit {
  const distance = shownUnit(units, "distance");
  const amount = storeUnit(unit, Math.min(...usePerMetre) * distance.si * 20);
  return { symbol: `${amount.symbol}/${distance.symbol}`, si: amount.si / distance.si, decimals: 2 };
}

/** Three significant figures. */
function significant(value: number): string {
  return number(value, Math.max(0, 2 - Math.floor(Math.log10(Math.max(Math.abs(value), 1e-9)))));
}

/** The top of a scale: what is spent near rest may rise without end, and is let run out of the plot. */
function heightOf(values: Float64Array, unit: ShownUnit): number {
  const least = Math.min(...values);
  const last = values.at(-1) ?? least;
  const most = Math.max(...values);
  return (Math.max(Math.min(most, Math.max(3.5 * least, 1.15 * last)), 1e-9) * 1.06) / unit.si;
}

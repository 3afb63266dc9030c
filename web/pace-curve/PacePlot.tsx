import type { WindowCell } from "../core.ts";
import { type LinearScale, linearScale } from "../format/linear-scale.ts";
import { routeHue } from "../format/palette.ts";
import { linePath } from "../format/svg-path.ts";
import { durationText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import { useWidth } from "../shell/use-width.ts";
import type { PageState } from "../state/page-state.ts";
import type { PaceAnswer } from "../worker/protocol.ts";
import { PaceMarks } from "./PaceMarks.tsx";
import { arrivingRuns, nearestPoint } from "./pace-runs.ts";

const HEIGHT = 158;
const TOP = 34;
const BOTTOM = HEIGHT - 30;
const LEFT = 46;

interface PacePlotProps {
  readonly page: PageState;
  readonly answer: PaceAnswer;
  readonly route: number;
  readonly measure: "use" | "time";
  readonly pointed: number | null;
  readonly onLook: (speed_m_s: number | null) => void;
  readonly onChoose: (speed_m_s: number) => void;
}

/** One figure against the speed through the medium, with what speaks against a speed as crosses under the curve. */
export function PacePlot({ page, answer, route, measure, pointed, onLook, onChoose }: PacePlotProps) {
  const { ref, width } = useWidth<HTMLDivElement>(380);
  const { points, storeUnit: unit, usable } = answer.curve;
  const amount = storeUnit(unit, usable);
  const figure = ({ use, passage_s }: WindowCell): number => (measure === "use" ? use : passage_s) ?? 0;
  const speeds = points.map(({ speed_m_s }) => speed_m_s ?? 0);
  const arriving = points.filter(({ arrival }) => arrival !== null);
  const most = Math.max(...arriving.map(figure), measure === "use" ? usable : 0, 1e-9);
  const least = speeds[0] ?? 0;
  const fastest = speeds.at(-1) ?? 1;
  const x = linearScale([least, Math.max(fastest, least + 1e-9)], [LEFT, Math.max(width - 8, LEFT + 1)]);
  const y = linearScale([0, most * 1.04], [BOTTOM, TOP]);
  const speed = shownUnit(page.view.units.value, "speed");
  const name = measure === "use" ? "Use" : "Time";
  const at = pointed ?? answer.speed_m_s ?? least;
  const near = nearestPoint(points, at);
  const told =
    near === null
      ? ""
      : measure === "use"
        ? `${inUnit(near.use, amount)} ${amount.symbol}`
        : durationText(near.passage_s);
  return (
    <div ref={ref} class="pace-plot">
      <div
        class="pace-slider"
        role="slider"
        tabIndex={0}
        aria-label={`${name} by speed; arrow keys look at a speed, Enter sets it`}
        aria-valuemin={least / speed.si}
        aria-valuemax={fastest / speed.si}
        aria-valuenow={Number((at / speed.si).toFixed(2))}
        aria-valuetext={`${inUnit(at, speed)} ${speed.symbol}, about ${told}`}
        onPointerMove={({ offsetX }) => onLook(within(x.invert(offsetX), least, fastest))}
        onPointerLeave={() => onLook(null)}
        onBlur={() => onLook(null)}
        onClick={({ offsetX }) => onChoose(within(x.invert(offsetX), least, fastest))}
        onKeyDown={(event) => {
          if (event.key === "Enter" || event.key === " ") onChoose(at);
          else {
            const next = stepped(event.key, at, speed.si, least, fastest);
            if (next === null) return;
            onLook(next);
          }
          event.preventDefault();
        }}
      >
        <svg width={width} height={HEIGHT} aria-hidden="true">
          <Axes
            x={x}
            y={y}
            speed={speed}
            amount={measure === "use" ? amount : null}
            width={width}
            name={name}
          />
          <Curve points={points} figure={figure} x={x} y={y} hue={routeHue(route)} />
          <PaceMarks
            answer={answer}
            measure={measure}
            x={x}
            y={y}
            bottom={BOTTOM}
            start={LEFT}
            pointed={pointed}
          />
        </svg>
      </div>
    </div>
  );
}

interface CurveProps {
  readonly points: readonly WindowCell[];
  readonly figure: (point: WindowCell) => number;
  readonly x: LinearScale;
  readonly y: LinearScale;
  readonly hue: string;
}

/** The curve where the route arrives, and a cross under every speed that cannot be done. */
function Curve({ points, figure, x, y, hue }: CurveProps) {
  const at = (point: WindowCell | undefined): number => x(point?.speed_m_s ?? 0);
  return (
    <>
      {arrivingRuns(points).map((run) => (
        <path
          key={run[0]?.speed_m_s}
          class="curve"
          stroke={hue}
          d={linePath(
            run.length,
            (i) => at(run[i]),
            (i) => y(run[i] === undefined ? 0 : figure(run[i])),
          )}
        />
      ))}
      {points
        .filter(({ status }) => status === "stop")
        .map((point) => (
          <path key={point.speed_m_s} class="refused" d={`M${at(point) - 2.5} ${BOTTOM - 7}l5 5m0 -5l-5 5`} />
        ))}
    </>
  );
}

interface AxesProps {
  readonly x: LinearScale;
  readonly y: LinearScale;
  readonly speed: { readonly si: number; readonly symbol: string };
  /** `null` for a time. */
  readonly amount: { readonly si: number; readonly symbol: string } | null;
  readonly width: number;
  readonly name: string;
}

function Axes({ x, y, speed, amount, width, name }: AxesProps) {
  const inSpeed = linearScale([x.invert(LEFT) / speed.si, x.invert(width - 8) / speed.si], [LEFT, width - 8]);
  const step = amount?.si ?? 3600;
  const inAmount = linearScale([0, y.invert(TOP) / step], [BOTTOM, TOP]);
  return (
    <g>
      <text x="0" y="10">
        {name} {amount?.symbol ?? "h"}
      </text>
      <path class="axis" d={`M${LEFT} ${TOP}V${BOTTOM}H${width - 8}`} />
      {inSpeed.ticks(Math.max(Math.floor(width / 70), 2)).map((tick) => (
        <g key={tick} transform={`translate(${inSpeed(tick)} ${BOTTOM})`}>
          <path class="axis" d="M0 0V4" />
          <text y="15" text-anchor="middle">
            {Number(tick.toFixed(3))}
          </text>
        </g>
      ))}
      <text x={width - 8} y={HEIGHT - 2} text-anchor="end">
        through the medium, {speed.symbol}
      </text>
      {inAmount.ticks(4).map((tick) => (
        <text key={tick} x={LEFT - 5} y={inAmount(tick) + 4} text-anchor="end">
          {Number(tick.toFixed(3))}
        </text>
      ))}
    </g>
  );
}

function within(value: number, least: number, most: number): number {
  return Math.min(Math.max(value, least), most);
}

/** Arrows by a tenth of a unit, pages by one unit. */
function stepped(key: string, from: number, unit: number, least: number, most: number): number | null {
  const steps: Record<string, number> = {
    ArrowRight: 0.1,
    ArrowUp: 0.1,
    ArrowLeft: -0.1,
    ArrowDown: -0.1,
    PageUp: 1,
    PageDown: -1,
  };
  if (key === "Home") return least;
  if (key === "End") return most;
  const step = steps[key];
  return step === undefined ? null : within(from + step * unit, least, most);
}

import { clockText, localInput } from "../format/time-text.ts";

const HOUR = 3_600_000;
const STEPS_H = [1, 2, 3, 6, 12, 24, 48, 96] as const;
/** Room for a label, px. */
const ROOM = 62;

interface HeatAxisProps {
  readonly departures: readonly number[];
  readonly cellWidth: number;
  readonly zone: string;
}

/** Hours under the window's columns, with the day where one begins. */
export function HeatAxis({ departures, cellWidth, zone }: HeatAxisProps) {
  const [first = 0, second = first + HOUR] = departures;
  const last = departures.at(-1) ?? first;
  const perMs = cellWidth / Math.max(second - first, 1);
  const x = (instant: number): number => (instant - first) * perMs + cellWidth / 2;
  const width = departures.length * cellWidth;
  return (
    <svg class="heat-axis" width={width} height="18" aria-hidden="true">
      {axisHours(first, last, perMs, zone).map(({ instant, isDay }) => {
        const place = x(instant);
        const anchor = place < 32 ? "start" : place > width - 32 ? "end" : "middle";
        return (
          <g key={instant} transform={`translate(${place} 0)`}>
            <path d="M0 0V4" />
            <text y="15" text-anchor={anchor} class={isDay ? "day" : ""}>
              {isDay ? clockText(instant, zone, true).slice(0, -6) : clockText(instant, zone, false)}
            </text>
          </g>
        );
      })}
    </svg>
  );
}

/** Whole hours of the zone between two instants, as many as there is room for. */
function axisHours(
  first: number,
  last: number,
  perMs: number,
  zone: string,
): readonly { readonly instant: number; readonly isDay: boolean }[] {
  const step = STEPS_H.find((hours) => hours * HOUR * perMs >= ROOM) ?? 168;
  const found: { instant: number; isDay: boolean }[] = [];
  let shown = Number.NEGATIVE_INFINITY;
  for (let instant = Math.ceil(first / HOUR) * HOUR; instant <= last; instant += HOUR) {
    const local = localInput(instant, zone);
    const hour = Number(local.slice(11, 13));
    if (hour % Math.min(step, 24) !== 0 || instant - shown < (step - 0.5) * HOUR) continue;
    shown = instant;
    found.push({ instant, isDay: hour === 0 });
  }
  return found;
}

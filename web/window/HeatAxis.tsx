import { clockText, localInput } from "../format/time-text.ts";

const HOUR = 3_600_000;
const STEPS_H = [1, 2, 3, 6, 12, 24, 48, 96] as const;
/** Room for a label, px: of a day, which is the widest, and of an hour. */
const ROOM = 62;
const HOUR_ROOM = 40;
/** Share of its room that a label takes before its place. */
const BEFORE = { start: 0, middle: 0.5, end: 1 } as const;

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
  // At either end a label is moved into the picture, and may stand where its neighbour does.
  let taken = Number.NEGATIVE_INFINITY;
  return (
    <svg class="heat-axis" width={width} height="18" aria-hidden="true">
      {axisHours(first, last, perMs, zone).map(({ instant, isDay }) => {
        const place = x(instant);
        const anchor = place < ROOM / 2 ? "start" : place > width - ROOM / 2 ? "end" : "middle";
        const room = isDay ? ROOM : HOUR_ROOM;
        const from = place - room * BEFORE[anchor];
        const hasRoom = from >= taken - 1;
        if (hasRoom) taken = from + room;
        return (
          <g key={instant} transform={`translate(${place} 0)`}>
            <path d="M0 0V4" />
            {hasRoom && (
              <text y="15" text-anchor={anchor} class={isDay ? "day" : ""}>
                {isDay ? clockText(instant, zone, true).slice(0, -6) : clockText(instant, zone, false)}
              </text>
            )}
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

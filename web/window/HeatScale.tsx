import type { ComponentChildren } from "preact";
import { SPEED_CLASSES, speedColour } from "../format/palette.ts";
import { durationText } from "../format/time-text.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import { figureRange, type Measure } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

const MEASURES: readonly (readonly [Measure, string])[] = [
  ["time", "Time"],
  ["use", "Use"],
  ["left", "Left"],
];

interface HeatScaleProps {
  readonly filled: Filled;
  readonly measure: Measure;
  readonly onMeasure: (measure: Measure) => void;
  /** What else chooses what the map shows. */
  readonly children?: ComponentChildren;
}

/** What the map's colours stand for, from the best to the worst, and how far the map is. */
export function HeatScale({ filled, measure, onMeasure, children }: HeatScaleProps) {
  const { cells, done, shape } = filled;
  const range = figureRange(cells, measure);
  const amount = storeUnit(shape.storeUnit, shape.usable);
  const text = (value: number): string =>
    measure === "time" ? durationText(value) : `${inUnit(value, amount)} ${amount.symbol}`;
  const [least, most] = range ?? [0, 0];
  const [best, worst] = measure === "left" ? [most, least] : [least, most];
  const classes = Array.from({ length: SPEED_CLASSES }, (_, at) => speedColour(at));
  return (
    <div class="heat-bar">
      <label>
        <span>Colours</span>{" "}
        <select
          value={measure}
          onChange={({ currentTarget: { value } }) =>
            onMeasure(MEASURES.find(([choice]) => choice === value)?.[0] ?? measure)
          }
        >
          {MEASURES.map(([choice, name]) => (
            <option key={choice} value={choice}>
              {name}
            </option>
          ))}
        </select>
      </label>
      {range !== null && (
        <span class="heat-scale">
          {text(best)}
          <svg width={classes.length * 12} height="10" aria-hidden="true">
            {classes.map((colour, at) => (
              <rect key={colour} x={at * 12} width="12" height="10" fill={colour} />
            ))}
          </svg>
          {text(worst)}
        </span>
      )}
      {children}
      <span class="heat-state quiet">
        {done < cells.length
          ? `${done} of ${cells.length} worked out`
          : "Point or tap to look at a departure"}
      </span>
    </div>
  );
}

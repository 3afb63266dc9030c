import type { DecidedRoute } from "../core.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import { SpreadBox, type SpreadKind } from "./SpreadBand.tsx";
import { type Between, errorBetween, membersBetween, onArrival } from "./spread-between.ts";
import "./spread.css";

interface SpreadLegendProps {
  readonly page: PageState;
  /** The chosen route. */
  readonly decided: DecidedRoute;
}

const KINDS = [
  ["error", "stated error", errorBetween],
  ["ensemble", "members", membersBetween],
] as const;

/** What the bands around the store lines are, and what they come to on the chosen route's arrival for those who hear the page. */
export function SpreadLegend({ decided }: SpreadLegendProps) {
  const shown = KINDS.flatMap(([kind, name, find]) => {
    const legs = find(decided);
    return legs.length === 0 ? [] : [{ kind, name, words: spreadText(decided, onArrival(decided, legs)) }];
  });
  if (shown.length === 0) return null;
  return (
    <p class="spread-legend">
      10 % to 90 %:
      {shown.map(({ kind, name, words }) => (
        <span key={kind} title={words}>
          <SpreadKey kind={kind} /> {name}
          <span class="unseen"> ({words})</span>
        </span>
      ))}
    </p>
  );
}

/** `left on arrival 20.5 to 25.3 kWh`. */
function spreadText({ storeUnit: unit, usable }: DecidedRoute, between: Between | null): string {
  if (between === null) return "does not arrive";
  const amount = storeUnit(unit, usable);
  return `left on arrival ${inUnit(between.low, amount)} to ${inUnit(between.high, amount)} ${amount.symbol}`;
}

/** A band as ribbons draw it. */
export function SpreadKey({ kind }: { readonly kind: SpreadKind }) {
  return (
    <svg width="22" height="10" aria-hidden="true">
      <SpreadBox kind={kind} x={1} y={1} width={20} height={8} />
    </svg>
  );
}

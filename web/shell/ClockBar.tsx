import { clockText, zoneText } from "../format/time-text.ts";
import { type PageState, shownInstant } from "../state/page-state.ts";

const MINUTE = 60_000;
/** Where the routes are so short that times have seconds, ms. */
const SHORT_STEP = 10_000;

/** Scrubs the chart through time, over the routes' time under way and the fields' valid times. */
export function ClockBar({ page }: { readonly page: PageState }) {
  const { view } = page;
  const span = clockSpan(page);
  const instant = shownInstant(page);
  if (span === null || instant === null) return null;
  const zone = view.zone.value;
  const clock = view.clock.value;
  const shown = Math.min(Math.max(instant, span.from), span.to);
  const coarse = span.to - span.from > 24 * 60 * MINUTE ? 10 * MINUTE : MINUTE;
  const step = clock === "second" ? SHORT_STEP : coarse;
  const text = clockText(shown, zone, true, shown % MINUTE === 0 ? clock : "second");
  return (
    <div class="clock-bar">
      <button
        type="button"
        onClick={() => {
          view.instant.value = null;
        }}
        disabled={view.instant.value === null}
      >
        Departure
      </button>
      <input
        type="range"
        aria-label="Instant shown on the chart"
        aria-valuetext={`${text} ${zoneText(shown, zone)}`}
        min={span.from}
        max={span.to}
        step={step}
        value={shown}
        onInput={({ currentTarget: { value } }) => {
          view.instant.value = Number(value);
        }}
      />
      <output>
        {text} <span class="zone">{zone === "UTC" ? "UTC" : zoneText(shown, zone)}</span>
      </output>
    </div>
  );
}

/** From the departure, or the first valid time where that is earlier, to the last arrival or valid time. */
function clockSpan({ answers, shown }: PageState): { from: number; to: number } | null {
  const { estimate, drawings } = answers.answer.value;
  const departure = Date.parse(shown.value.departure);
  if (estimate === null || Number.isNaN(departure)) return null;
  const ends = drawings.map((drawing) => departure + 1000 * (drawing?.profile?.time_s.at(-1) ?? 0));
  const valid = estimate.fields.flatMap(({ validFrom, validTo }) =>
    [validFrom, validTo].flatMap((time) => (time === null ? [] : [Date.parse(time)])),
  );
  const all = [departure, ...ends, ...valid];
  const from = Math.min(...all);
  const to = Math.max(...all);
  return to > from ? { from, to } : null;
}

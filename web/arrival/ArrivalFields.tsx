import type { ArrivalAnswer, ArrivalSolution } from "../core.ts";
import { clockSince, fromLocalInput, localInput, zoneText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { setArrival } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { ArrivalDocument } from "../state/plan-document.ts";
import { timeOf } from "./ask-arrival.ts";

/** When to arrive, and the speeds that make it on every route. */
export function ArrivalFields({ page }: { readonly page: PageState }) {
  const { store, view } = page;
  const { pace } = store.plan.value;
  if (pace === undefined || !("arrive" in pace)) return null;
  const { arrive } = pace;
  const isWindow = typeof arrive !== "string";
  const notAfter = isWindow ? arrive.notAfter : arrive;
  const notBefore = isWindow ? (arrive.notBefore ?? null) : null;
  const change = (next: ArrivalDocument["arrive"]): void =>
    store.edit("Change arrival", (plan) => setArrival(plan, next));
  return (
    <>
      <label>
        <span>Arrive</span>
        <select
          value={rule(arrive)}
          onChange={({ currentTarget: { value } }) => {
            if (value === "at") change(notAfter);
            else if (value === "by") change({ notAfter });
            else change({ notBefore: notBefore ?? earlier(notAfter), notAfter });
          }}
        >
          <option value="at">at</option>
          <option value="by">by</option>
          <option value="between">between</option>
        </select>
      </label>
      {rule(arrive) === "between" && notBefore !== null && (
        <TimeField
          label="Not before"
          value={notBefore}
          zone={view.zone.value}
          onTime={(time) => change({ notBefore: time, notAfter })}
        />
      )}
      <TimeField
        label={rule(arrive) === "at" ? "Arrival" : "Not after"}
        value={notAfter}
        zone={view.zone.value}
        onTime={(time) => change(isWindow ? { ...arrive, notAfter: time } : time)}
      />
      <div class="plan-item found-speeds">
        <span>Speeds found</span>
        <ul>
          {page.routes.value.map((route, at) =>
            route?.arrive === undefined ? null : (
              <li key={at}>
                <Swatch route={at} /> {route.name}:{" "}
                <Found page={page} answer={route.arrive} departure={route.departure} route={at} />
              </li>
            ),
          )}
        </ul>
      </div>
    </>
  );
}

interface FoundProps {
  readonly page: PageState;
  readonly answer: ArrivalAnswer;
  readonly departure: string;
  readonly route: number;
}

/** All speeds that arrive in time, the cheapest and the one taken marked; where there is none, the nearest arrival and why. */
function Found({ page, answer, departure, route }: FoundProps) {
  const { view } = page;
  const speed = shownUnit(view.units.value, "speed");
  const speedOf = ({ speed_m_s }: ArrivalSolution): string => `${inUnit(speed_m_s, speed)} ${speed.symbol}`;
  if (answer.solutions.length === 0) {
    const { nearest, reason } = answer;
    return (
      <span class="none-found" title={reason ?? ""}>
        none
        {nearest === null
          ? ", no speed completes the route"
          : `; nearest ${clockSince(nearest.arrival, departure, view.zone.value, view.clock.value)} at ${speedOf(nearest)}`}
      </span>
    );
  }
  const store = page.routes.value[route];
  const unit = store ? storeUnit(store.storeUnit, store.usable) : null;
  const { chosen, cheapest = chosen } = answer;
  const several = answer.solutions.length > 1;
  return (
    <>
      {answer.solutions.map((solution, at) => (
        <span key={solution.speed_m_s} class={at === chosen && several ? "best-figure" : ""}>
          {at > 0 && !several ? ", " : ""}
          {speedOf(solution)}
          {several && unit !== null && ` for ${inUnit(solution.use, unit)} ${unit.symbol}`}
          {at === cheapest && several && " (cheapest)"}
          {at === chosen && at !== cheapest && " (cheapest that holds)"}{" "}
        </span>
      ))}
    </>
  );
}

interface TimeFieldProps {
  readonly label: string;
  readonly value: string;
  readonly zone: string;
  readonly onTime: (time: string) => void;
  /** Takes the time away, where there may be none. */
  readonly onClear?: () => void;
  /** The element that says what is wrong with the time. */
  readonly faultId?: string;
}

/** A time in the zone that the page shows, written to the plan in UTC. */
export function TimeField({ label, value, zone, onTime, onClear, faultId }: TimeFieldProps) {
  const instant = Date.parse(value);
  const shown = Number.isNaN(instant) ? "" : localInput(instant, zone);
  const field = (
    <label>
      <span>
        {label} {Number.isNaN(instant) ? zone : zoneText(instant, zone)}
      </span>
      <input
        type="datetime-local"
        value={shown}
        {...(faultId === undefined ? {} : { "aria-invalid": true, "aria-describedby": faultId })}
        onChange={(event) => {
          const asked = fromLocalInput(event.currentTarget.value, zone);
          if (asked !== null) onTime(timeOf(asked));
        }}
        // A field is empty while a part of it is typed anew: only one that is left so means no time.
        onBlur={({ currentTarget }) => {
          if (currentTarget.value !== "" || shown === "") return;
          if (onClear === undefined) currentTarget.value = shown;
          else onClear();
        }}
      />
    </label>
  );
  if (onClear === undefined) return field;
  return (
    <div class="clearable">
      {field}
      {shown !== "" && (
        <button type="button" aria-label={`Take out: ${label}`} onClick={onClear}>
          ✕
        </button>
      )}
    </div>
  );
}

function rule(arrive: ArrivalDocument["arrive"]): "at" | "by" | "between" {
  if (typeof arrive === "string") return "at";
  return arrive.notBefore === undefined ? "by" : "between";
}

function earlier(time: string): string {
  const instant = Date.parse(time);
  return Number.isNaN(instant) ? time : timeOf(instant - 3_600_000);
}

import type { ArrivalAnswer, ArrivalSolution } from "../core.ts";
import { clockSince, timeOf } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { TimeField } from "../shell/TimeField.tsx";
import { setArrival } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { ArrivalDocument } from "../state/plan-document.ts";

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
          at="pace.arrive.notBefore"
          zone={view.zone.value}
          onTime={(time) => change({ notBefore: time, notAfter })}
        />
      )}
      <TimeField
        label={rule(arrive) === "at" ? "Arrival" : "Not after"}
        value={notAfter}
        at={isWindow ? "pace.arrive.notAfter" : "pace.arrive"}
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

function rule(arrive: ArrivalDocument["arrive"]): "at" | "by" | "between" {
  if (typeof arrive === "string") return "at";
  return arrive.notBefore === undefined ? "by" : "between";
}

function earlier(time: string): string {
  const instant = Date.parse(time);
  return Number.isNaN(instant) ? time : timeOf(instant - 3_600_000);
}

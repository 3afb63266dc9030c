import type { PageState } from "../state/page-state.ts";
import type { PaceDocument } from "../state/plan-document.ts";
import { setPace } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { LazyPart } from "./LazyPart.tsx";
import { PACES } from "./plan-words.ts";

const loadArrival = () => import("../arrival/ArrivalFields.tsx").then(({ ArrivalFields }) => ArrivalFields);

/** The rule of pace, with the figure that it takes. */
export function PaceFields({ page }: { readonly page: PageState }) {
  const { store } = page;
  const pace = store.plan.value.pace ?? { hold: "through-speed" };
  const isArriving = "arrive" in pace;
  const choose = async (rule: string): Promise<void> => {
    if (rule === "arrive") {
      const { askArrival } = await import("../arrival/ask-arrival.ts");
      askArrival(page);
      return;
    }
    const hold = PACES.find(([key]) => key === rule)?.[0];
    if (hold) store.edit("Change pace", (plan) => setPace(plan, isArriving ? { hold } : { ...pace, hold }));
  };
  return (
    <>
      <label>
        <span>Pace</span>
        <select
          value={isArriving ? "arrive" : pace.hold}
          onChange={({ currentTarget: { value } }) => void choose(value)}
        >
          {PACES.map(([key, text]) => (
            <option key={key} value={key}>
              {text}
            </option>
          ))}
          <option value="arrive">arrive when asked</option>
        </select>
      </label>
      {isArriving ? <LazyPart page={page} load={loadArrival} /> : <HoldField page={page} pace={pace} />}
    </>
  );
}

function HoldField({ page: { store }, pace }: { readonly page: PageState; readonly pace: PaceDocument }) {
  const change = (next: PaceDocument): void => store.edit("Change pace", (plan) => setPace(plan, next));
  return (
    <>
      {(pace.hold === "through-speed" || pace.hold === "ground-speed") && (
        <div class="plan-item short">
          <span>Speed</span>
          <TextField
            label="Speed"
            at="pace.speed"
            value={pace.speed ?? ""}
            placeholder="the craft's"
            onText={(speed) => change({ ...pace, speed })}
          />
        </div>
      )}
      {pace.hold === "power" && (
        <div class="plan-item short">
          <span>Power</span>
          <TextField
            label="Power"
            at="pace.power"
            value={pace.power ?? ""}
            placeholder="40 kW"
            onText={(power) => change({ ...pace, power })}
          />
        </div>
      )}
    </>
  );
}

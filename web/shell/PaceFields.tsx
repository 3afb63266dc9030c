import type { PageState } from "../state/page-state.ts";
import type { PaceDocument } from "../state/plan-document.ts";
import { setPace } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { PACES } from "./plan-words.ts";

/** The rule of pace, with the figure that it takes. */
export function PaceFields({ page: { store } }: { readonly page: PageState }) {
  const pace = store.plan.value.pace ?? { hold: "through-speed" };
  const change = (next: PaceDocument): void => store.edit("Change pace", (plan) => setPace(plan, next));
  return (
    <>
      <label>
        <span>Pace</span>
        <select
          value={pace.hold}
          onChange={({ currentTarget: { value } }) => {
            const hold = PACES.find(([key]) => key === value)?.[0];
            if (hold) change({ ...pace, hold });
          }}
        >
          {PACES.map(([key, text]) => (
            <option key={key} value={key}>
              {text}
            </option>
          ))}
        </select>
      </label>
      {(pace.hold === "through-speed" || pace.hold === "ground-speed") && (
        <div class="plan-item short">
          <span>Speed</span>
          <TextField
            label="Speed"
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
            value={pace.power ?? ""}
            placeholder="40 kW"
            onText={(power) => change({ ...pace, power })}
          />
        </div>
      )}
    </>
  );
}

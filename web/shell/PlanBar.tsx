import { Readings } from "../files/Readings.tsx";
import { fromLocalInput, localInput, zoneText } from "../format/time-text.ts";
import type { PageState } from "../state/page-state.ts";
import type { PaceDocument } from "../state/plan-document.ts";
import { deleteField, setDeparture, setPace, setPlanText } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { craftName, PACES } from "./plan-words.ts";

/** What holds for all routes: departure, craft, pace, reserve, fields. */
export function PlanBar({ page }: { readonly page: PageState }) {
  const { store, view } = page;
  const plan = store.plan.value;
  const zone = view.zone.value;
  const departure = Date.parse(plan.departure);
  return (
    <section class="plan-bar" data-pane="route" aria-label="Plan">
      <label>
        <span>Departure {Number.isNaN(departure) ? zone : zoneText(departure, zone)}</span>
        <input
          type="datetime-local"
          value={Number.isNaN(departure) ? "" : localInput(departure, zone)}
          onChange={({ currentTarget: { value } }) => {
            const instant = fromLocalInput(value, zone);
            if (instant === null) return;
            const text = new Date(instant).toISOString().replace(".000Z", "Z");
            store.edit("Change departure", (old) => setDeparture(old, text));
          }}
        />
      </label>
      <div class="plan-item">
        <span>Craft</span>
        <strong>{craftName(plan.craft, page.craftNames.value)}</strong>
      </div>
      <PaceFields page={page} />
      <div class="plan-item short">
        <span>Reserve</span>
        <TextField
          label="Reserve"
          value={plan.reserve ?? ""}
          placeholder="20 %"
          onText={(text) => store.edit("Change reserve", (old) => setPlanText(old, "reserve", text))}
        />
      </div>
      <div class="plan-item fields">
        <span>Fields</span>
        <ul>
          {(plan.fields ?? []).map(({ role, file }, index) => (
            <li key={file}>
              <em>{role}</em> {file}
              <button
                type="button"
                aria-label={`Take ${file} out of the plan`}
                onClick={() => store.edit("Take out field", (old) => deleteField(old, index))}
              >
                ✕
              </button>
            </li>
          ))}
          <Readings page={page} />
          {(plan.fields ?? []).length === 0 && <li>none: a still-medium estimate; drop a CSV here</li>}
        </ul>
      </div>
    </section>
  );
}

function PaceFields({ page: { store } }: { readonly page: PageState }) {
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

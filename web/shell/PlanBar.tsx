import { FieldButton } from "../files/FieldButton.tsx";
import { Readings } from "../files/Readings.tsx";
import type { PageState } from "../state/page-state.ts";
import { deleteField, setDeparture, setPlanText } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { CraftButton } from "./CraftButton.tsx";
import { PaceFields } from "./PaceFields.tsx";
import { craftName } from "./plan-words.ts";
import { TimeField } from "./TimeField.tsx";

/** What holds for all routes: departure, craft, pace, reserve, fields. */
export function PlanBar({ page }: { readonly page: PageState }) {
  const { store, view } = page;
  const plan = store.plan.value;
  const { fault } = page.answers.answer.value;
  return (
    <section class="plan-bar" data-pane="route" aria-label="Plan">
      <TimeField
        label="Departure"
        value={plan.departure}
        zone={view.zone.value}
        at="departure"
        onTime={(time) => store.edit("Change departure", (old) => setDeparture(old, time))}
      />
      <div class="plan-item">
        <span>Craft</span>
        <CraftButton page={page} name={craftName(plan.craft, page.craftNames.value)} />
      </div>
      <PaceFields page={page} />
      <div class="plan-item short">
        <span>Reserve</span>
        <TextField
          label="Reserve"
          at="reserve"
          value={plan.reserve ?? ""}
          placeholder="20 %"
          onText={(text) => store.edit("Change reserve", (old) => setPlanText(old, "reserve", text))}
        />
      </div>
      <div class="plan-item fields">
        <span>Fields</span>
        <ul>
          {(plan.fields ?? []).map(({ file }, index) => (
            <li key={file}>
              <FieldButton page={page} index={index} />
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
      {/* Where the ledger, which says it, is another pane. */}
      {fault !== null && (
        <p class="fault plan-fault" role="alert">
          {fault}
        </p>
      )}
    </section>
  );
}

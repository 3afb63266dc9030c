import {
  addAlternate,
  alternateName,
  changeAlternate,
  deleteAlternate,
  setAlternateText,
} from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { AlternateDocument, PlanDocument } from "../state/plan-document.ts";
import { asWritten } from "../waypoints/as-written.ts";
import { TextField } from "../waypoints/TextField.tsx";

const KEYS: readonly (readonly [keyof AlternateDocument, string])[] = [
  ["name", "Name"],
  ["lat", "Latitude"],
  ["lon", "Longitude"],
  ["height", "Height"],
];

interface AlternateListProps {
  readonly page: PageState;
  /** Whether what is shown of turning back is of the alternates as they were a moment before. */
  readonly isBehind: boolean;
}

/** The plan's alternates, typed or set on the chart, where they can be dragged. */
export function AlternateList({ page, isBehind }: AlternateListProps) {
  const { store, desk } = page;
  const alternates = store.plan.value.alternates ?? [];
  return (
    <section class="alternates" aria-label="Alternates">
      {alternates.length > 0 && (
        <table class="waypoint-table">
          <thead>
            <tr>
              <th scope="col">#</th>
              {KEYS.map(([key, name]) => (
                <th key={key} scope="col">
                  {key === "name" ? "Alternate" : name}
                </th>
              ))}
              <th scope="col">
                <span class="unseen">Take out</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {alternates.map((alternate, at) => (
              <AlternateRow key={at} page={page} alternate={alternate} at={at} />
            ))}
          </tbody>
        </table>
      )}
      <div class="tools waypoint-tools">
        <button
          type="button"
          aria-pressed={desk.placing.value}
          onClick={() => {
            desk.placing.value = !desk.placing.value;
            // A phone shows the chart in place of the desk.
            if (desk.placing.value && window.innerWidth < 700) page.view.pane.value = "chart";
          }}
        >
          {desk.placing.value
            ? "Click the chart to set it, or press Enter on it…"
            : "Set an alternate on the chart"}
        </button>
        <button type="button" onClick={() => addNear(page)}>
          Type an alternate
        </button>
        {isBehind && <span class="quiet">Working it out again…</span>}
      </div>
    </section>
  );
}

interface AlternateRowProps {
  readonly page: PageState;
  readonly alternate: AlternateDocument;
  readonly at: number;
}

function AlternateRow({ page: { store }, alternate, at }: AlternateRowProps) {
  return (
    <tr>
      <th scope="row">{at + 1}</th>
      {KEYS.map(([key, name]) => (
        <td key={key}>
          <TextField
            label={`${name} of alternate ${at + 1}`}
            at={`alternates[${at}].${key}`}
            value={String(alternate[key] ?? "")}
            placeholder={key === "name" ? alternateName(alternate, at) : ""}
            onText={(text) => store.edit("Change alternate", (plan) => withText(plan, at, key, text))}
          />
        </td>
      ))}
      <td>
        <button
          type="button"
          aria-label={`Take out alternate ${alternateName(alternate, at)}`}
          onClick={() => store.edit("Take out alternate", (plan) => deleteAlternate(plan, at))}
        >
          ✕
        </button>
      </td>
    </tr>
  );
}

/** An alternate without a position is none: an emptied one stays what it was. */
function withText(plan: PlanDocument, at: number, key: keyof AlternateDocument, text: string): PlanDocument {
  if (key === "name" || key === "height") return setAlternateText(plan, at, key, text);
  return text.trim() === "" ? plan : changeAlternate(plan, at, { [key]: asWritten(text) });
}

/** Begins an alternate halfway along the chosen route, to be typed over. */
function addNear({ store, answers }: PageState): void {
  const drawing = answers.answer.peek().drawings[store.selection.peek().route];
  const middle = drawing ? drawing.lat.length >> 1 : 0;
  const round = (degrees: number): number => Number(degrees.toFixed(4));
  const lat = round(drawing?.lat[middle] ?? 0);
  const lon = round((((((drawing?.lon[middle] ?? 0) + 180) % 360) + 360) % 360) - 180);
  store.edit("Add alternate", (plan) => addAlternate(plan, lat, lon));
}

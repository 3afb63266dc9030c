import { addWhatIf, deleteWhatIf, setWhatIf } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { WhatIfDocument } from "../state/plan-document.ts";
import { asWritten } from "../waypoints/as-written.ts";
import { TextField } from "../waypoints/TextField.tsx";

type Key = keyof WhatIfDocument;

const KEYS: readonly (readonly [Key, string, string])[] = [
  ["name", "Name", "in words"],
  ["wind", "Wind ×", "1"],
  ["veer", "Wind veered", "0 deg"],
  ["current", "Current ×", "1"],
  ["speed", "Speed +", "0 kn"],
  ["consumption", "Use +", "0 %"],
  ["late", "Late", "0 min"],
];

const COMMON: readonly (readonly [string, WhatIfDocument])[] = [
  ["wind × 1.2", { wind: 1.2 }],
  ["wind veered 15°", { veer: "15 deg" }],
  ["current × 1.2", { current: 1.2 }],
  ["use + 10 %", { consumption: "10 %" }],
  ["1 h late", { late: "1 h" }],
];

/** The plan's what-ifs, edited; several changes in one row act together. */
export function WhatIfList({ page }: { readonly page: PageState }) {
  const { store } = page;
  const whatIfs = store.plan.value.whatIf ?? [];
  return (
    <section aria-label="What-ifs">
      <h3>What if</h3>
      {whatIfs.length > 0 && (
        <table class="waypoint-table what-if-fields">
          <thead>
            <tr>
              <th scope="col">#</th>
              {KEYS.map(([key, name]) => (
                <th key={key} scope="col">
                  {name}
                </th>
              ))}
              <th scope="col">
                <span class="unseen">Take out</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {whatIfs.map((whatIf, at) => (
              <WhatIfRow key={at} page={page} whatIf={whatIf} at={at} />
            ))}
          </tbody>
        </table>
      )}
      <div class="tools waypoint-tools">
        <span class="quiet">Add:</span>
        {COMMON.map(([name, whatIf]) => (
          <button
            key={name}
            type="button"
            onClick={() => store.edit("Add what-if", (plan) => addWhatIf(plan, whatIf))}
          >
            {name}
          </button>
        ))}
      </div>
    </section>
  );
}

interface WhatIfRowProps {
  readonly page: PageState;
  readonly whatIf: WhatIfDocument;
  readonly at: number;
}

function WhatIfRow({ page: { store }, whatIf, at }: WhatIfRowProps) {
  return (
    <tr>
      <th scope="row">{at + 1}</th>
      {KEYS.map(([key, name, placeholder]) => (
        <td key={key} data-label={name}>
          <TextField
            label={`${name} of what-if ${at + 1}`}
            at={`whatIf[${at}].${key}`}
            value={String(whatIf[key] ?? "")}
            placeholder={placeholder}
            onText={(text) =>
              store.edit("Change what-if", (plan) => setWhatIf(plan, at, withText(whatIf, key, text)))
            }
          />
        </td>
      ))}
      <td>
        <button
          type="button"
          aria-label={`Take out what-if ${at + 1}`}
          onClick={() => store.edit("Take out what-if", (plan) => deleteWhatIf(plan, at))}
        >
          ✕
        </button>
      </td>
    </tr>
  );
}

/** A what-if with a text in one of its keys: factors are numbers, what is none stays as written, an empty text takes the key away. */
function withText(whatIf: WhatIfDocument, key: Key, text: string): WhatIfDocument {
  const { [key]: _old, ...rest } = whatIf;
  if (text.trim() === "") return rest;
  if (key !== "wind" && key !== "current") return { ...rest, [key]: text };
  return { ...rest, [key]: asWritten(text) };
}

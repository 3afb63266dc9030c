import { setError } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { ErrorDocument, FieldDocument } from "../state/plan-document.ts";
import { setPlanText } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";

/** Something to begin from; every figure is the user's to set. */
const BEGIN: Readonly<Record<FieldDocument["role"], ErrorDocument>> = {
  wind: { speed: "1.5 m/s", length: "150 km", time: "6 h" },
  current: { speed: "0.2 m/s", length: "30 km", time: "6 h" },
};

const KEYS: readonly (readonly [keyof ErrorDocument, string])[] = [
  ["speed", "Deviation per component"],
  ["length", "Correlated over"],
  ["time", "and over"],
];

/** How wrong each field may be, as the plan states it, and the probability with which the reserve has to hold then. */
export function ErrorFields({ page: { store } }: { readonly page: PageState }) {
  const { fields = [], confidence } = store.plan.value;
  const isStated = fields.some(({ error }) => error !== undefined);
  const roles = [...new Set(fields.map(({ role }) => role))];
  if (roles.length === 0 && confidence === undefined) return null;
  return (
    <section class="error-fields" aria-label="Forecast error">
      <h3>Forecast error</h3>
      {roles.map((role) => {
        const stated = fields.findIndex((field) => field.role === role && field.error !== undefined);
        const error = fields[stated]?.error;
        if (error === undefined) {
          return (
            <button
              key={role}
              type="button"
              onClick={() => store.edit("State an error", (plan) => setError(plan, role, BEGIN[role]))}
            >
              State an error of the {role}
            </button>
          );
        }
        return (
          <div key={role} class="window-bar">
            <strong>{role}</strong>
            {KEYS.map(([key, name]) => (
              <div key={key} class="plan-item short">
                <span>{name}</span>
                <TextField
                  label={`${name}, ${role}`}
                  at={`fields[${stated}].error.${key}`}
                  value={error[key]}
                  onText={(text) => {
                    if (text.trim() !== "")
                      store.edit("Change error", (plan) => setError(plan, role, { ...error, [key]: text }));
                  }}
                />
              </div>
            ))}
            <button
              type="button"
              onClick={() => store.edit("Take out error", (plan) => setError(plan, role, null))}
            >
              Take out
            </button>
          </div>
        );
      })}
      {(isStated || confidence !== undefined) && (
        <div class="window-bar">
          <div class="plan-item short">
            <span>Reserve to hold with</span>
            <TextField
              label="Probability with which the reserve has to hold"
              at="confidence"
              value={confidence ?? ""}
              placeholder="not asked"
              onText={(text) =>
                store.edit("Change confidence", (plan) => setPlanText(plan, "confidence", text))
              }
            />
          </div>
        </div>
      )}
    </section>
  );
}

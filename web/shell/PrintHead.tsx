import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";
import { craftName, instantText, paceText } from "./plan-words.ts";

/** What a filed print says above its tables: the plan, what it rests on, and when it was made. */
export function PrintHead({ page }: { readonly page: PageState }) {
  const made = useSignal(0);
  useEffect(() => {
    const stamp = (): void => {
      made.value = Math.round(Date.now() / 60_000) * 60_000;
    };
    stamp();
    window.addEventListener("beforeprint", stamp);
    return () => window.removeEventListener("beforeprint", stamp);
  }, [made]);

  const plan = page.store.plan.value;
  const zone = page.view.zone.value;
  const fields = page.answers.answer.value.estimate?.fields ?? [];
  const time = (instant: string): string => instantText(instant, zone);
  return (
    <section class="print-head only-print">
      <h1>{plan.title ?? "Untitled plan"}</h1>
      <dl>
        <dt>Departure</dt>
        <dd>{instantText(plan.departure, zone)}</dd>
        <dt>Craft</dt>
        <dd>{craftName(plan.craft, page.craftNames.value)}</dd>
        <dt>Pace</dt>
        <dd>{paceText(plan.pace)}</dd>
        <dt>Reserve</dt>
        <dd>{plan.reserve ?? "none named"}</dd>
        <dt>Fields</dt>
        <dd>
          {fields.length === 0 ? "none: a still medium" : null}
          {fields.map(({ role, files, validFrom, validTo, members }) => (
            <p key={role}>
              {role}: {[...new Set(members?.flatMap((each) => each.files) ?? files)].join(", ")}
              {members && ` (${members.length} members)`}
              {validFrom !== null && validTo !== null && `, valid ${time(validFrom)} to ${time(validTo)}`}
            </p>
          ))}
        </dd>
        <dt>Made</dt>
        <dd>{time(new Date(made.value).toISOString())} with Legwork</dd>
      </dl>
    </section>
  );
}

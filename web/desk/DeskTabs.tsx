import type { DeskPart } from "../state/desk.ts";
import type { PageState } from "../state/page-state.ts";

const PARTS: readonly (readonly [DeskPart, string])[] = [
  ["legs", "Legs"],
  ["window", "Departures"],
  ["pace", "Pace"],
  ["turn-back", "Turning back"],
  ["sure", "How sure"],
];

/** What lies on the desk; without the legs where a narrow screen has a pane of their own for them. */
export function DeskTabs({ page, legs }: { readonly page: PageState; readonly legs: boolean }) {
  const { desk } = page;
  return (
    <nav class={legs ? "desk-tabs wide-desk" : "desk-tabs narrow-desk"} aria-label="On the desk">
      {PARTS.filter(([part]) => legs || part !== "legs").map(([part, name]) => (
        <button
          key={part}
          type="button"
          aria-current={desk.part.value === part ? "true" : undefined}
          onClick={() => {
            desk.part.value = part;
          }}
        >
          {name}
        </button>
      ))}
    </nav>
  );
}

import { Swatch } from "../ribbon/Ribbon.tsx";
import { wantsDecisions } from "../state/decisions.ts";
import type { PageState } from "../state/page-state.ts";
import { AlternateList } from "./AlternateList.tsx";
import { REACH_WORDS } from "./RibbonReach.tsx";
import { TurnBackList } from "./TurnBackList.tsx";
import { awayGoals, goalName } from "./turn-back-places.ts";

/** How far out each route can still turn back to its start or off to an alternate, and the alternates themselves. */
export function TurnBackView({ page }: { readonly page: PageState }) {
  const routes = page.routes.value;
  const { route: chosen } = page.store.selection.value;
  const turn = routes[chosen]?.turnBack;
  const { fault, ensemble } = page.answers.answer.value;
  const isBehind =
    fault === null && turn !== undefined && page.decisions.decided.value?.plan !== page.shown.value;
  return (
    <div class="turn-back-view">
      <AlternateList page={page} isBehind={isBehind} />
      {turn !== undefined && (
        <p class="reach-legend">
          Strips under the chosen ribbon, from the top:{" "}
          {awayGoals(turn)
            .map((goal) => goalName(turn, goal))
            .join(", ")}
          .{" "}
          {REACH_WORDS.map(([reach, words]) => (
            <span key={reach}>
              <svg class="reach" width="26" height="8" aria-hidden="true">
                <path class={reach} d="M1 4H25" />
              </svg>{" "}
              {words}
            </span>
          ))}
        </p>
      )}
      {routes.map((route, at) =>
        route === null ? null : (
          <section key={at} class="turn-back-route">
            <h3>
              <Swatch route={at} /> {route.name}
            </h3>
            {route.turnBack === undefined ? (
              <p class="quiet">
                {fault !== null
                  ? "Not worked out: the plan has a fault."
                  : wantsDecisions(page.shown.value, ensemble)
                    ? "Working it out again…"
                    : "Working it out…"}
              </p>
            ) : (
              <TurnBackList page={page} at={at} route={route} />
            )}
          </section>
        ),
      )}
      <p class="quiet turn-back-note">
        From every place at the moment of being there, at the plan's pace and without stays: back along the
        track, or straight to an alternate, against what is left above the reserve.
      </p>
    </div>
  );
}

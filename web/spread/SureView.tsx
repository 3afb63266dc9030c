import type { DecidedRoute } from "../core.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { wantsDecisions } from "../state/decisions.ts";
import type { PageState } from "../state/page-state.ts";
import { ErrorFields } from "./ErrorFields.tsx";
import { LegSpreadTable } from "./LegSpreadTable.tsx";
import { SpreadGauges } from "./SpreadGauges.tsx";
import { ensembleWords, spreadWords } from "./spread-words.ts";
import { WhatIfList } from "./WhatIfList.tsx";
import { WhatIfTable } from "./WhatIfTable.tsx";

/** How sure the estimates are: what-ifs, the stated forecast error, and an ensemble's members; three sources, never mixed. */
export function SureView({ page }: { readonly page: PageState }) {
  const { store, desk, decisions } = page;
  const routes = page.routes.value;
  const chosen = routes[store.selection.value.route] ?? null;
  const pending =
    page.answers.answer.value.fault === null &&
    wantsDecisions(page.shown.value, page.answers.answer.value.ensemble) &&
    decisions.decided.value?.plan !== page.shown.value;
  const isSpread = routes.some((route) => route?.spread);
  return (
    <div class="sure-view">
      <SpreadGauges page={page} />
      {pending && <p class="quiet">Working it out…</p>}
      <WhatIfList page={page} />
      {chosen !== null && <WhatIfTable page={page} route={chosen} />}
      <ErrorFields page={page} />
      {isSpread && (
        <label>
          <input
            type="checkbox"
            checked={desk.sensitivity.value}
            onChange={({ currentTarget: { checked } }) => {
              desk.sensitivity.value = checked;
            }}
          />{" "}
          Draw on ribbons and chart where a wrong forecast adds most to the spread of the use
        </label>
      )}
      {routes.map((route, at) =>
        route !== null && (route.spread !== undefined || route.ensemble !== undefined) ? (
          <RouteSure key={at} page={page} route={route} at={at} />
        ) : null,
      )}
    </div>
  );
}

function RouteSure({ page, route, at }: { page: PageState; route: DecidedRoute; at: number }) {
  const { spread, ensemble } = route;
  return (
    <section>
      <h3>
        <Swatch route={at} /> {route.name}
      </h3>
      {spread === null && (
        <p class="quiet">Forecast error: no spread, since the route ends short or no error acts on it.</p>
      )}
      {spread && (
        <p>
          Forecast error (the hatched band around the store line: 10 % to 90 %).{" "}
          {spreadWords(route, spread, page.view).join(" ")}
        </p>
      )}
      {ensemble !== undefined && (
        <p>
          Ensemble (the dashed band: 10 % to 90 % of members).{" "}
          {ensembleWords(route, ensemble, page.view).join(" ")}
        </p>
      )}
      <LegSpreadTable route={route} />
    </section>
  );
}

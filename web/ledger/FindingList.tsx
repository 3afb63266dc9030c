import type { Finding } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { SeverityShape } from "./StatusMark.tsx";

/** The chosen route's findings in words, the gravest first; each leads to its place. */
export function FindingList({ page }: { readonly page: PageState }) {
  const { route: chosen } = page.store.selection.value;
  const route = page.routes.value[chosen];
  if (!route) return null;
  const order = ["stop", "caution", "note"];
  const findings = [...route.findings].sort((a, b) => order.indexOf(a.severity) - order.indexOf(b.severity));
  return (
    <section class="findings" aria-label={`Findings of ${route.name}`}>
      <h3>Findings of {route.name}</h3>
      {findings.length === 0 ? (
        <p class="quiet">Nothing to report.</p>
      ) : (
        <ul>
          {findings.map((finding) => (
            <li key={`${finding.code} ${finding.leg} ${finding.at_m}`}>
              <button type="button" onClick={() => goTo(page, chosen, finding)}>
                <SeverityShape severity={finding.severity} />
                <span>
                  <span class="unseen">{finding.severity}: </span>
                  {finding.message}
                </span>
              </button>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

function goTo({ store, view, answers }: PageState, route: number, finding: Finding): void {
  if (finding.leg === null) return;
  store.select({ route, waypoint: finding.leg });
  const drawing = answers.answer.value.drawings[route];
  const start = drawing?.distance_m[drawing.waypoints[finding.leg - 1] ?? 0] ?? 0;
  view.pointed.value = { route, distance_m: start + (finding.at_m ?? 0) };
  if (finding.lat !== null && finding.lon !== null)
    view.lookAt.value = { lat: finding.lat, lon: finding.lon };
}

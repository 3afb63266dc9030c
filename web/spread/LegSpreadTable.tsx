import type { DecidedRoute } from "../core.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import { type Between, errorBetween, membersBetween } from "../ribbon/spread-between.ts";

/** The bands of a ribbon in figures: what is left at the end of every leg. */
export function LegSpreadTable({ route }: { readonly route: DecidedRoute }) {
  const error = errorBetween(route);
  const members = membersBetween(route);
  if (error.length + members.length === 0) return null;
  const amount = storeUnit(route.storeUnit, route.usable);
  const words = (between: Between | null | undefined): string =>
    between == null ? "–" : `${inUnit(between.low, amount)} to ${inUnit(between.high, amount)}`;
  return (
    <details class="leg-spread">
      <summary>At the end of every leg</summary>
      <table>
        <caption>
          Left of {route.name}, {amount.symbol}, 10 % to 90 %
        </caption>
        <thead>
          <tr>
            <th scope="col">Leg to</th>
            <th scope="col">Left</th>
            {error.length > 0 && <th scope="col">Stated error</th>}
            {members.length > 0 && <th scope="col">Members</th>}
          </tr>
        </thead>
        <tbody>
          {route.legs.map((leg, at) => (
            <tr key={at}>
              <th scope="row">
                {at + 1} {leg.to}
              </th>
              <td class="figure">{inUnit(leg.remaining, amount)}</td>
              {error.length > 0 && <td class="figure">{words(error[at])}</td>}
              {members.length > 0 && <td class="figure">{words(members[at])}</td>}
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}

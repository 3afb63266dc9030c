import { type DecidedRoute, percentText } from "../core.ts";

/** How sure it is that the reserve, or the store, suffices, and by which source; `null` where nothing is known about it. */
export function sureWords({ reserve, spread, ensemble }: DecidedRoute): string | null {
  const words: string[] = [];
  if (spread) {
    const share = percentText(spread.reserveHolds).replace("less than", "<").replace("more than", ">");
    words.push(`${share} by the stated error`);
  }
  if (ensemble !== undefined) {
    const { reserveHolds, members } = ensemble;
    words.push(`in ${Math.round(reserveHolds * members.length)} of ${members.length} members`);
  }
  return words.length === 0
    ? null
    : `${reserve === 0 ? "Store lasts" : "Reserve holds"}: ${words.join("; ")}`;
}

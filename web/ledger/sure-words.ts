import { type DecidedRoute, percentText } from "../core.ts";

/** How sure the store is, in a few characters; none where nothing is known about it. */
export function sureWords({ spread, ensemble }: DecidedRoute): string[] {
  const words: string[] = [];
  if (spread) {
    const share = percentText(spread.reserveHolds).replace("less than", "<").replace("more than", ">");
    words.push(`holds: ${share}`);
  }
  if (ensemble !== undefined) {
    const held = Math.round(ensemble.reserveHolds * ensemble.members.length);
    words.push(`holds: ${held} of ${ensemble.members.length}`);
  }
  return words;
}

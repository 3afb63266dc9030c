import type { Craft, Reserve } from "../craft/craft.ts";
import { legFinding, type NumberedLeg, storeText } from "./findings.ts";
import type { Finding } from "./result.ts";
import { placeOfUse, type Samples } from "./samples.ts";

/** The reserve in store units; 0 where there is none, `null` where it is a time at a rate that is not known. */
export function reserveAmount(
  reserve: Reserve | null,
  craft: Craft,
  finalRate: number | null,
): number | null {
  if (reserve === null) return 0;
  switch (reserve.kind) {
    case "share":
      return reserve.share * craft.store.usable;
    case "amount":
      return reserve.amount;
    case "time":
      return finalRate === null ? null : reserve.time_s * finalRate;
  }
}

/** Where the store falls below the reserve and where it runs empty: one finding per leg from there on. */
export function storeFindings(
  samples: Samples,
  legs: readonly NumberedLeg[],
  craft: Craft,
  reserve: number | null,
  left: number | null,
): Finding[] {
  const marks: { code: "store-empty" | "reserve-broken"; above: number }[] = [
    { code: "store-empty", above: 0 },
  ];
  if (reserve !== null && reserve > 0) marks.unshift({ code: "reserve-broken", above: reserve });
  return marks.flatMap(({ code, above }) => {
    const place = placeOfUse(samples, craft.store.usable - above);
    if (place === null) return [];
    const lastLeg = samples.leg[samples.leg.length - 1] as number;
    const lastPlace = samples.place[samples.place.length - 1] as number;
    return legs
      .filter(({ number }) => number >= place.leg && number <= lastLeg)
      .map((leg) => {
        const first = leg.number === place.leg;
        const to = leg.number === lastLeg ? lastPlace : leg.prepared.track.length;
        return legFinding(code, leg, first ? place.at : 0, to, storeText(code, first, craft, above, left));
      });
  });
}

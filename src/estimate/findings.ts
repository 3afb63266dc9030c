import type { LandStretch } from "../coast/land-crossings.ts";
import type { Craft } from "../craft/craft.ts";
import type { FieldRole } from "../field/field.ts";
import { amountText, lengthText, momentText, speedText, speedTexts } from "./finding-text.ts";
import type { Watched } from "./leg-watch.ts";
import type { PreparedLeg } from "./prepare.ts";
import type { Finding, FindingCode, RouteStatus, Severity } from "./result.ts";

const SEVERITIES: Readonly<Record<FindingCode, Severity>> = {
  "cannot-hold-track": "stop",
  "outside-area": "stop",
  "outside-time": "stop",
  gap: "stop",
  "outside-power-table": "stop",
  "store-empty": "stop",
  "reserve-broken": "stop",
  "reserve-unsure": "stop",
  "wind-limit": "stop",
  "gust-limit": "stop",
  "arrival-missed": "stop",
  "gap-filled": "caution",
  "held-beyond": "caution",
  "zero-outside": "caution",
  "slow-over-ground": "caution",
  "stems-flow": "caution",
  "wind-against-current": "caution",
  "crosses-land": "caution",
  "height-outside-field": "caution",
  "near-pole": "note",
  "field-unused": "note",
  "field-shared": "note",
  "no-field": "note",
  "no-variation": "note",
  "pace-found": "note",
};

/** A leg with its number, as findings speak of it. */
export interface NumberedLeg {
  readonly number: number;
  readonly prepared: PreparedLeg;
}

/** A finding about a stretch of a leg (metres from its start); `what` follows the place and a colon. */
export function legFinding(
  code: FindingCode,
  leg: NumberedLeg,
  from: number,
  to: number,
  what: string,
): Finding {
  const { track } = leg.prepared;
  const place = track.at(Math.min(Math.max(from, 0), track.length));
  return {
    code,
    severity: SEVERITIES[code],
    leg: leg.number,
    at_m: from,
    to_m: to,
    lat: place.lat,
    lon: place.lon - 360 * Math.round(place.lon / 360),
    message: `leg ${leg.number}, ${extentText(leg, from, to)}: ${what}`,
  };
}

/** A finding about the whole route. */
export function routeFinding(code: FindingCode, message: string): Finding {
  return {
    code,
    severity: SEVERITIES[code],
    leg: null,
    at_m: null,
    to_m: null,
    lat: null,
    lon: null,
    message,
  };
}

function extentText(leg: NumberedLeg, from: number, to: number): string {
  const { track, from: start, to: end } = leg.prepared;
  if (from <= 0 && to >= track.length) return `${start.name} to ${end.name}`;
  if (from >= track.length) return `at ${end.name}`;
  if (to - from < 1) return from <= 0 ? `at ${start.name}` : `${lengthText(from)} after ${start.name}`;
  const first = from <= 0 ? `from ${start.name}` : `from ${lengthText(from)} after ${start.name}`;
  return `${first} ${to >= track.length ? `to ${end.name}` : `for ${lengthText(to - from)}`}`;
}

/** Whether a finding is that the store does not last: it ends empty, or with less than the reserve. */
export function isOfStore({ code }: Pick<Finding, "code">): boolean {
  return code === "reserve-broken" || code === "store-empty";
}

/** What a watched stretch has to say, by code. */
export function watchedText({ code, role, stretch }: Watched, craft: Craft): string {
  const repeated = stretch.times > 1 ? `, ${stretch.times} times, ${lengthText(stretch.touched)} in all` : "";
  switch (code) {
    case "wind-limit":
    case "gust-limit":
    case "slow-over-ground":
      return `${passedText(code, stretch.peak, craft)}${repeated}`;
    case "gap-filled":
      return `the ${role} has missing values here, filled by the plan's gap policy over ${lengthText(stretch.touched)}${repeated}`;
    case "held-beyond":
      return `the ${role} ends before this; its last values are held over ${lengthText(stretch.touched)}`;
    case "zero-outside":
      return `outside the ${role}'s area; taken as no ${role} over ${lengthText(stretch.touched)}${repeated}`;
    case "height-outside-field":
      return `the height is outside the ${role}'s levels; the nearest level holds over ${lengthText(stretch.touched)}${repeated}`;
    case "stems-flow":
      return `the flow along the track, up to ${speedText(stretch.peak)}, overtakes the ground speed ordered; the craft points against its course${repeated}`;
    case "wind-against-current":
      return `wind up to ${speedText(stretch.peak)} against the current: expect short steep seas${repeated}`;
    case "near-pole":
      return "beyond 85° of latitude; directions turn fast here";
    default:
      throw new Error(`no text for a stretch of ${code}`);
  }
}

/** That a limit of the craft is passed, and by how much at most. */
function passedText(
  code: "wind-limit" | "gust-limit" | "slow-over-ground",
  peak: number,
  { limits }: Craft,
): string {
  if (code === "slow-over-ground") {
    const least = limits.groundSpeed_m_s ?? 0;
    const [down, below] = speedTexts(least - peak, least);
    return `ground speed down to ${down}, below the craft's ${below}`;
  }
  const [what, most] =
    code === "wind-limit"
      ? (["wind", limits.wind_m_s ?? 0] as const)
      : (["gusts", limits.gust_m_s ?? 0] as const);
  const [up, above] = speedTexts(peak, most);
  return `${what} up to ${up}, above the craft's limit of ${above}`;
}

/** What a leg over the coarse land has to say: a hint, never a clearance. */
export function landText(stretches: readonly LandStretch[]): string {
  const over = stretches.reduce((sum, { from_m, to_m }) => sum + to_m - from_m, 0);
  const times = stretches.length > 1 ? ` in ${stretches.length} places` : "";
  return `crosses land${times}, ${lengthText(over)} in all, on a coarse coastline (Natural Earth 1:10m, off by 0.7 km in the median and by more than 4.5 km in a tenth of places): a hint only, check the official chart`;
}

/** What stops a route, by code. */
export function stopText(
  code: FindingCode,
  role: FieldRole | null,
  held: { readonly along: number; readonly cross: number; readonly throughSpeed: number },
  moment: number,
  validity: string,
): string {
  switch (code) {
    case "outside-area":
      return `the ${role} file's area ends here; the estimate stops`;
    case "outside-time":
      return `it is ${momentText(moment)} here, and ${validity}; the estimate stops`;
    case "gap":
      return `the ${role} has missing values here that its gap policy does not fill; the estimate stops`;
    case "outside-power-table":
      return `the pace asks for ${speedText(held.throughSpeed)} through the medium, where the power model has no value; the estimate stops`;
    case "cannot-hold-track":
      return cannotHoldText(held);
    default:
      throw new Error(`no text for a stop by ${code}`);
  }
}

function cannotHoldText({
  along,
  cross,
  throughSpeed,
}: {
  along: number;
  cross: number;
  throughSpeed: number;
}): string {
  const head = "the track cannot be held";
  if (Math.abs(cross) >= throughSpeed) {
    const side = cross > 0 ? "starboard" : "port";
    return `${head}: the flow sets ${speedText(Math.abs(cross))} to ${side} across it, and the speed through the medium is ${speedText(throughSpeed)}`;
  }
  return `${head}: the flow along it is ${speedText(Math.abs(along))} against the craft, which leaves no ground speed at ${speedText(throughSpeed)} through the medium`;
}

/** What a store below a mark says: where it first falls below, on this leg or since an earlier one. */
export function storeText(
  code: "store-empty" | "reserve-broken",
  first: boolean,
  craft: Craft,
  reserve: number,
  leftAtEnd: number | null,
): string {
  const { unit } = craft.store;
  const since = first ? "falls" : "is";
  const what =
    code === "store-empty"
      ? first
        ? "the store runs empty here"
        : "the store is empty"
      : `what is left ${since} below the reserve of ${amountText(reserve, unit)}`;
  if (!first || leftAtEnd === null) return what;
  return leftAtEnd < 0
    ? `${what}; the route needs ${amountText(-leftAtEnd, unit)} more than is aboard`
    : `${what}; at the end ${amountText(leftAtEnd, unit)} is left, ${amountText(reserve - leftAtEnd, unit)} short`;
}

/** The worst of the findings. */
export function statusOf(findings: readonly Finding[]): RouteStatus {
  if (findings.some(({ severity }) => severity === "stop")) return "stop";
  return findings.some(({ severity }) => severity === "caution") ? "caution" : "clear";
}

import type { LegEstimate, RouteEstimate } from "../estimate/result.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import type { ReportInput } from "./input.ts";
import { courseText } from "./number-text.ts";
import { plainText } from "./plain-text.ts";
import { durationText } from "./time-text.ts";
import { xmlDecimal, xmlText } from "./xml-text.ts";

/** Places of a degree: 0.1 mm, below which a waypoint has no meaning. */
const DEGREE_PLACES = 9;

function element(name: string, text: string, indent: string): string[] {
  return text === "" ? [] : [`${indent}<${name}>${xmlText(text)}</${name}>`];
}

/** GPX takes -180 <= longitude < 180: what would round to 180 is the same meridian from the other side. */
function longitude(lon: number): string {
  const text = xmlDecimal(reduceTurn(lon), DEGREE_PLACES);
  return text === "180" ? "-180" : text;
}

function legText(leg: LegEstimate): string {
  const parts = [
    `leg ${leg.leg}`,
    leg.path,
    `course ${courseText(leg.initialCourse_deg)} true`,
    `${(leg.distance_m / 1000).toFixed(3)} km`,
  ];
  if (leg.heading_deg !== null) parts.push(`heading ${courseText(leg.heading_deg.mean)} true`);
  if (leg.time_s !== null) parts.push(`${durationText(Math.round(leg.time_s), "second")} under way`);
  if (leg.arrival !== null) parts.push(`ETA ${leg.arrival}`);
  if (leg.stay_s > 0) parts.push(`stay ${durationText(Math.round(leg.stay_s), "second")}`);
  return parts.join(", ");
}

function routePoint(waypoint: Waypoint, leg: LegEstimate | undefined): string[] {
  const height = waypoint.height_m === null ? [] : [`      <ele>${xmlDecimal(waypoint.height_m, 3)}</ele>`];
  const about = waypoint.height_m === null ? "" : "ele is the height above the surface";
  return [
    `    <rtept lat="${xmlDecimal(waypoint.lat, DEGREE_PLACES)}" lon="${longitude(waypoint.lon)}">`,
    ...height,
    ...element("name", plainText(waypoint.name), "      "),
    ...element("cmt", about, "      "),
    ...element("desc", leg === undefined ? "departure" : legText(leg), "      "),
    "    </rtept>",
  ];
}

/** Words, not data: six significant digits, no exponent for amounts below 1e21. */
function amount(value: number): string {
  return String(Number(value.toPrecision(6)));
}

function routeText(route: RouteEstimate): string {
  const { totals } = route;
  const parts = [route.status, `departure ${route.departure}`, `${(totals.distance_m / 1000).toFixed(3)} km`];
  if (totals.time_s !== null) parts.push(`${durationText(Math.round(totals.time_s), "second")} under way`);
  if (route.arrival !== null) parts.push(`ETA ${route.arrival}`);
  if (totals.use !== null) parts.push(`use ${amount(totals.use)} ${route.storeUnit}`);
  if (totals.remaining !== null) parts.push(`left ${amount(totals.remaining)} ${route.storeUnit}`);
  return parts.join(", ");
}

function routeElement(route: RouteEstimate, geometry: Route | undefined, number: number): string[] {
  if (geometry === undefined) throw new Error(`route ${number} has no geometry`);
  const findings = route.findings
    .map((finding) => `${finding.severity}: ${plainText(finding.message)}`)
    .join("; ");
  return [
    "  <rte>",
    ...element("name", plainText(route.name), "    "),
    ...element("cmt", findings, "    "),
    ...element("desc", routeText(route), "    "),
    `    <number>${number}</number>`,
    ...geometry.waypoints.flatMap((waypoint, index) => routePoint(waypoint, route.legs[index - 1])),
    "  </rte>",
  ];
}

/**
 * The routes as GPX 1.1: a `<rte>` each, its waypoints with the figures of the leg that arrives at them in `<desc>`. Times are in the
 * words only: GPX keeps `<time>` for when a point was made. `<ele>` is the height above the surface, as its `<cmt>` says.
 *
 * @example
 * writeGpx({ estimate: { format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }, routes: [], craft: { name: "Tender", moves: "water" }, pace: { hold: "least-energy" } }).includes("<name>Two marks</name>") // → true
 */
export function writeGpx({ estimate, routes }: ReportInput): string {
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<gpx version="1.1" creator="Legwork" xmlns="http://www.topografix.com/GPX/1/1"' +
      ' xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance"' +
      ' xsi:schemaLocation="http://www.topografix.com/GPX/1/1 http://www.topografix.com/GPX/1/1/gpx.xsd">',
    "  <metadata>",
    ...element("name", plainText(estimate.plan.title), "    "),
    ...element("desc", plainText(estimate.advisory), "    "),
    "  </metadata>",
    ...estimate.routes.flatMap((route, index) => routeElement(route, routes[index], index + 1)),
    "</gpx>",
    "",
  ].join("\n");
}

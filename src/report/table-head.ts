import type { Medium, Pace } from "../craft/craft.ts";
import type { FieldSummary } from "../estimate/result.ts";
import { TABLE_WIDTH } from "./columns.ts";
import type { ReportInput } from "./input.ts";
import { placedText } from "./number-text.ts";
import { plainText, wrapped } from "./plain-text.ts";
import { inLastPlace } from "./rounding.ts";
import type { TableUnits } from "./table-units.ts";
import { instantText } from "./time-text.ts";

function powerText(watts: number): string {
  const kilowatts = watts / 1000;
  return `${kilowatts.toFixed(kilowatts < 10 ? 2 : kilowatts < 100 ? 1 : 0)} kW`;
}

function paceText(pace: Pace, moves: Medium, units: TableUnits): string {
  const speed = (value: number) => `${(value / units.speed.size).toFixed(1)} ${units.speed.symbol}`;
  switch (pace.hold) {
    case "through-speed":
      return `holds ${speed(pace.speed_m_s)} through the ${moves}`;
    case "ground-speed":
      return `holds ${speed(pace.speed_m_s)} over the ground`;
    case "power":
      return `holds ${powerText(pace.power_W)}`;
    case "least-energy":
      return "holds the speed of least energy per distance";
  }
}

function fieldText(field: FieldSummary): string {
  const files = field.files.map(plainText).join(", ");
  if (field.validFrom === null || field.validTo === null) return `${files}; steady`;
  return `${files}; valid ${instantText(field.validFrom, "minute").replace(" UTC", "")} to ${instantText(field.validTo, "minute")}`;
}

/** An amount of the store with its unit. */
export function amountText(amount: number, units: TableUnits): string {
  const { size, decimals, symbol } = units.store;
  return `${placedText(inLastPlace(amount / size, decimals), decimals, 12)} ${symbol}`;
}

/** What the estimate is of: title, craft and pace, departure, fields with their validity, store. */
export function tableHead({ estimate, routes, craft, pace }: ReportInput, units: TableUnits): string[] {
  const title = plainText(estimate.plan.title);
  const [first] = estimate.routes;
  const own = routes.some((route) => route.waypoints.some((waypoint) => waypoint.speed_m_s !== null));
  const held = `${paceText(pace, craft.moves, units)}${own ? ", except where a leg names its own speed" : ""}`;
  const entries: [string, string][] = [["Craft", `${plainText(craft.name)}, ${held}`]];
  if (first !== undefined) {
    entries.push(["Departure", instantText(first.departure, units.clock)]);
    entries.push(["Store", `${amountText(first.usable, units)} usable`]);
  }
  for (const field of estimate.fields)
    entries.push([field.role === "wind" ? "Wind" : "Current", fieldText(field)]);
  if (estimate.fields.length === 0) entries.push(["Fields", "none: still air and water"]);
  return [
    ...wrapped(title === "" ? "Untitled plan" : title, TABLE_WIDTH),
    ...entries.flatMap(([label, text]) => wrapped(text, TABLE_WIDTH, `${label}:`.padEnd(11))),
  ];
}

import { wantedText } from "../choose/arrival-answer.ts";
import type { Medium, Pace } from "../craft/craft.ts";
import type { ArrivalAnswer, FieldSummary } from "../estimate/result.ts";
import { TABLE_WIDTH } from "./columns.ts";
import type { ReportInput } from "./input.ts";
import { placedText } from "./number-text.ts";
import { plainText, wrapped } from "./plain-text.ts";
import { inLastPlace } from "./rounding.ts";
import type { ColumnUnit, TableUnits } from "./table-units.ts";
import { instantText } from "./time-text.ts";

function powerText(watts: number): string {
  const kilowatts = watts / 1000;
  return `${kilowatts.toFixed(kilowatts < 10 ? 2 : kilowatts < 100 ? 1 : 0)} kW`;
}

/** How the craft chooses its speed, in words after its name. */
export function paceText(pace: Pace, moves: Medium, unit: ColumnUnit): string {
  const speed = (value: number) => `${(value / unit.size).toFixed(1)} ${unit.symbol}`;
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

/** As {@link paceText}, where the pace asks for an arrival. */
export function arriveText(asked: Pick<ArrivalAnswer, "notBefore" | "notAfter">, moves: Medium): string {
  return `holds the speed through the ${moves} that arrives ${wantedText(asked)}, each route its own`;
}

/** Files of a field, those of every member, and their validity. */
export function fieldText(field: FieldSummary): string {
  const { members } = field;
  const all = new Set(members?.flatMap((member) => member.files) ?? field.files);
  const count = members === undefined ? "" : ` (${members.length} members)`;
  const files = Array.from(all, plainText).join(", ") + count;
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
  const how =
    first?.arrive === undefined
      ? paceText(pace, craft.moves, units.speed)
      : arriveText(first.arrive, craft.moves);
  const held = `${how}${own ? ", except where a leg names its own speed" : ""}`;
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

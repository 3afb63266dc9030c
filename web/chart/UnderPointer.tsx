import { number, shownUnit } from "../format/units.ts";
import type { UnitsPreset } from "../state/page-view.ts";
import type { FieldAt } from "../worker/protocol.ts";

const NONE = {
  "outside-area": "outside its area",
  "outside-time": "outside its times",
  gap: "a gap",
} as const;

/** What the fields say at a place: a wind by where it comes from, a current by where it sets. */
export function UnderPointer({ fields, units }: { fields: readonly FieldAt[]; units: UnitsPreset }) {
  return (
    <>
      {fields.map((field) => (
        <span key={field.role} class={`under-${field.role}`}>
          {fieldText(field, units)}
        </span>
      ))}
    </>
  );
}

/** `wind from 247° 12.3 kn, gusts 16.0`, `current sets 214° 0.9 kn`. */
export function fieldText({ role, flow, none }: FieldAt, units: UnitsPreset): string {
  if (flow === null) return `${role}: ${none === null ? "no value" : NONE[none]}`;
  const { si, symbol, decimals } = shownUnit(units, "speed");
  const speed = number(flow.speed_m_s / si, decimals);
  const degrees = `${number(Math.round(flow.direction_deg) % 360, 0).padStart(3, "0")}°`;
  const gust = flow.gust_m_s === null ? "" : `, gusts ${number(flow.gust_m_s / si, decimals)}`;
  return `${role} ${role === "wind" ? "from" : "sets"} ${degrees} ${speed} ${symbol}${gust}`;
}

import { currentSet, type Field, sampleField, windFrom } from "./core.ts";
import type { FieldAt, PlaceQuestion } from "./protocol.ts";

/** What each field says of a place at an instant: a wind by where it comes from, a current by where it sets. */
export function fieldsAt(fields: readonly Field[], question: PlaceQuestion): FieldAt[] {
  const { lat, lon, height_m, instant } = question;
  return fields.map((field) => {
    const found = sampleField(field, lat, lon, height_m, instant);
    if (found.none !== null) return { role: field.role, flow: null, none: found.none };
    return { role: field.role, flow: flowOf(field, found), none: null };
  });
}

function flowOf(
  { role }: Field,
  { u, v, gust }: { u: number; v: number; gust: number | null },
): FieldAt["flow"] {
  if (role === "wind") {
    const { speed, from_deg } = windFrom(u, v);
    return { speed_m_s: speed, direction_deg: from_deg, gust_m_s: gust };
  }
  const { drift, set_deg } = currentSet(u, v);
  return { speed_m_s: drift, direction_deg: set_deg, gust_m_s: null };
}

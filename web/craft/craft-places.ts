import type { CraftDocument } from "../state/plan-document.ts";
import { tableRows, textAt } from "./craft-edits.ts";
import { LIMITS, MODEL_FIELDS, MODELS, pathText, SPEEDS, STORE, WINDAGE } from "./craft-fields.ts";

/** Whether the form shows a place where a fault at this key is told. */
export function hasPlace(craft: CraftDocument | null, key: string | null): boolean {
  if (craft === null || key === null) return false;
  const model = MODELS.find(([name]) => name === textAt(craft, ["power", "model"]))?.[0];
  const rows = model === "table" ? tableRows(craft) : [];
  const isWater = textAt(craft, ["moves"]) !== "air";
  const fields = [
    ...(model === undefined ? [] : MODEL_FIELDS[model]),
    ...[SPEEDS, STORE, LIMITS, ...(isWater ? [WINDAGE] : [])].flatMap((section) => section.fields),
  ];
  const keys = [
    "name",
    "power",
    "power.model",
    "speeds",
    "store",
    "limits",
    ...(isWater ? ["windage"] : []),
    ...(model === "table" ? ["power.rows"] : []),
    ...rows.flatMap((_, at) => [`power.rows[${at}].speed`, `power.rows[${at}].rate`]),
    ...fields.map(({ path }) => pathText(path)),
  ];
  return keys.includes(key);
}

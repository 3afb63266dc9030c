import * as z from "zod/mini";
import { type CraftDocument, craftSchema } from "./craft-schema.ts";
import { type PlanDocument, planSchema } from "./plan-schema.ts";

/** Longest line on which an object or list without objects inside stands whole. */
const WIDTH = 110;

/**
 * Writes a plan document as the text of its file: keys in the order of the schema, so that the same plan gives the same bytes;
 * keys that are `undefined` are left out; quantities, times and positions stay as the user wrote them.
 *
 * @example
 * const plan = {
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * };
 * serializePlan(plan).split("\n")[1] // → '  "format": "legwork-plan/1",'
 */
export function serializePlan(document: PlanDocument): string {
  return `${jsonText(inOrder(document, planSchema), "")}\n`;
}

/**
 * Writes a craft document as the text of its file, as {@link serializePlan} does.
 *
 * @example
 * const power = { model: "constant", rate: "1 kW" };
 * const text = serializeCraft({ store: { capacity: "10 kWh" }, power, moves: "water", name: "Boat" });
 * text.split("\n")[1] // → '  "name": "Boat",'
 */
export function serializeCraft(document: CraftDocument): string {
  return `${jsonText(inOrder(document, craftSchema), "")}\n`;
}

/** A copy with the keys of every object in the order of its schema; keys that the schema lacks follow in their own. */
function inOrder(value: unknown, schema: unknown): unknown {
  if (schema instanceof z.ZodMiniOptional) return inOrder(value, schema.def.innerType);
  if (Array.isArray(value)) {
    const item = schema instanceof z.ZodMiniArray ? schema.def.element : undefined;
    return value.map((each) => inOrder(each, item));
  }
  if (typeof value !== "object" || value === null) return value;
  const { shape } = objectSchema(value, schema) ?? { shape: {} };
  const known = Object.keys(shape).filter((key) => Object.hasOwn(value, key));
  const others = Object.keys(value).filter((key) => !Object.hasOwn(shape, key));
  return Object.fromEntries(
    [...known, ...others].map((key) => [key, inOrder(Reflect.get(value, key), Reflect.get(shape, key))]),
  );
}

/** The object schema that a value is written to: of a union, the first whose words and keys are the value's. */
function objectSchema(value: object, schema: unknown): z.ZodMiniObject | undefined {
  if (schema instanceof z.ZodMiniObject) return schema;
  if (!(schema instanceof z.core.$ZodUnion)) return undefined;
  return objectOptions(schema).find(({ shape }) =>
    Object.entries(value).every(([key, item]) => {
      const known: unknown = Reflect.get(shape, key);
      return known instanceof z.ZodMiniEnum ? known.safeParse(item).success : known !== undefined;
    }),
  );
}

function jsonText(value: unknown, indent: string): string {
  const isList = Array.isArray(value);
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const entries = Object.entries(value).filter(([, item]) => item !== undefined);
  const deeper = `${indent}  `;
  const items = entries.map(
    ([key, item]) => `${isList ? "" : `${JSON.stringify(key)}: `}${jsonText(item, deeper)}`,
  );
  const [open, close] = isList ? ["[", "]"] : ["{", "}"];
  if (items.length === 0) return open + close;
  const blank = isList ? "" : " ";
  const line = `${open}${blank}${items.join(", ")}${blank}${close}`;
  const isFlat = !entries.some(([, item]) => typeof item === "object" && item !== null);
  if (isFlat && indent.length + line.length <= WIDTH) return line;
  return `${open}\n${items.map((item) => deeper + item).join(",\n")}\n${indent}${close}`;
}

/** The object schemas of a union and of the unions in it. */
function objectOptions(union: z.core.$ZodUnion): z.ZodMiniObject[] {
  return union._zod.def.options.flatMap((option) => {
    if (option instanceof z.core.$ZodUnion) return objectOptions(option);
    return option instanceof z.ZodMiniObject ? [option] : [];
  });
}

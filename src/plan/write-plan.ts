import { type CraftDocument, craftSchema } from "./craft-schema.ts";
import { type PlanDocument, planSchema } from "./plan-schema.ts";

/** Longest line on which an object or list without objects inside stands whole. */
const WIDTH = 110;

/**
 * Writes a plan document as the text of its file: keys in the order of the schema, so that the same plan gives the same bytes;
 * keys that are `undefined` are left out; quantities, times and positions stay as the user wrote them.
 */
export function serializePlan(document: PlanDocument): string {
  const { craft } = document;
  const ordered = inOrder(document, Object.keys(planSchema.shape), {
    craft: "file" in craft ? craft : orderedCraft(craft),
    ...(document.pace === undefined ? {} : { pace: inOrder(document.pace, ["hold", "speed", "power"]) }),
    ...(document.fields === undefined
      ? {}
      : { fields: document.fields.map((field) => inOrder(field, FIELD_KEYS)) }),
    routes: document.routes.map((route) =>
      inOrder(route, ROUTE_KEYS, {
        waypoints: route.waypoints.map((waypoint) => inOrder(waypoint, WAYPOINT_KEYS)),
      }),
    ),
  });
  return `${jsonText(ordered, "")}\n`;
}

/** Writes a craft document as the text of its file, as {@link serializePlan} does. */
export function serializeCraft(document: CraftDocument): string {
  return `${jsonText(orderedCraft(document), "")}\n`;
}

const routeSchema = planSchema.shape.routes.element;
const ROUTE_KEYS = Object.keys(routeSchema.shape);
const WAYPOINT_KEYS = Object.keys(routeSchema.shape.waypoints.element.shape);
const FIELD_KEYS = Object.keys(planSchema.shape.fields.unwrap().element.shape);

function orderedCraft(craft: CraftDocument): object {
  const { shape } = craftSchema;
  const model = shape.power.options.find((option) => option.shape.model.safeParse(craft.power.model).success);
  return inOrder(craft, Object.keys(shape), {
    power: inOrder(craft.power, Object.keys(model?.shape ?? {})),
    ...(craft.windage === undefined
      ? {}
      : { windage: inOrder(craft.windage, Object.keys(shape.windage.unwrap().shape)) }),
    ...(craft.speeds === undefined ? {} : { speeds: inOrder(craft.speeds, ["min", "max"]) }),
    store: inOrder(craft.store, Object.keys(shape.store.shape)),
    ...(craft.limits === undefined
      ? {}
      : { limits: inOrder(craft.limits, Object.keys(shape.limits.unwrap().shape)) }),
  });
}

/** A copy with its keys in an order, some values replaced; keys outside the order follow in their own. */
function inOrder(
  given: object,
  order: readonly string[],
  replaced: Readonly<Record<string, unknown>> = {},
): object {
  const values = { ...given, ...replaced };
  const known = order.filter((key) => Object.hasOwn(values, key));
  const others = Object.keys(values).filter((key) => !order.includes(key));
  return Object.fromEntries([...known, ...others].map((key) => [key, Reflect.get(values, key)]));
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

/** A JSON schema, or a part of one. */
export type Schema = Readonly<Record<string, unknown>>;

const NOTES = ["$schema", "title", "description"];

type Rule = (value: unknown, given: unknown, schema: Schema) => boolean;

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value);

const kindOf = (value: unknown): string => {
  if (value === null) return "null";
  return Array.isArray(value) ? "array" : typeof value;
};

const parts = (given: unknown): Schema[] => given as Schema[];

/** Whether each keyword holds; those about another kind than the value's do not concern it. JSON Schema 2020-12, Validation, section 6. */
const RULES: Readonly<Record<string, Rule>> = {
  type: (value, given) => (Array.isArray(given) ? given : [given]).includes(kindOf(value)),
  enum: (value, given) => (given as unknown[]).includes(value),
  const: (value, given) => value === given,
  pattern: (value, given) => typeof value !== "string" || new RegExp(given as string, "u").test(value),
  minimum: (value, given) => typeof value !== "number" || value >= (given as number),
  maximum: (value, given) => typeof value !== "number" || value <= (given as number),
  exclusiveMinimum: (value, given) => typeof value !== "number" || value > (given as number),
  multipleOf: (value, given) => typeof value !== "number" || Number.isInteger(value / (given as number)),
  minItems: (value, given) => !Array.isArray(value) || value.length >= (given as number),
  items: (value, given) => !Array.isArray(value) || value.every((item) => conforms(item, given as Schema)),
  required: (value, given) =>
    !isObject(value) || (given as string[]).every((key) => Object.hasOwn(value, key)),
  properties: (value, given) =>
    !isObject(value) ||
    Object.entries(given as Record<string, Schema>).every(
      ([key, schema]) => !Object.hasOwn(value, key) || conforms(value[key], schema),
    ),
  additionalProperties: (value, given, { properties = {} }) =>
    !isObject(value) ||
    given !== false ||
    Object.keys(value).every((key) => Object.hasOwn(properties as object, key)),
  anyOf: (value, given) => parts(given).some((schema) => conforms(value, schema)),
  oneOf: (value, given) => parts(given).filter((schema) => conforms(value, schema)).length === 1,
};

/**
 * Whether a value is as a schema says.
 *
 * @throws Error for a keyword that is not known here, so that none is passed over
 */
export function conforms(value: unknown, schema: Schema): boolean {
  return Object.entries(schema).every(([keyword, given]) => {
    if (NOTES.includes(keyword)) return true;
    const rule = RULES[keyword];
    if (rule === undefined) throw new Error(`the schema has the keyword ${keyword}`);
    return rule(value, given, schema);
  });
}

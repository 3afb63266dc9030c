import { expect } from "vitest";
import { InputError } from "../../src/errors.ts";
import type { CraftDocument } from "../../src/plan/craft-schema.ts";
import type { OpenFile, Plan } from "../../src/plan/plan.ts";
import type { PlanDocument } from "../../src/plan/plan-schema.ts";
import { readPlan } from "../../src/plan/read-plan.ts";

/** A sound craft with every key that a table model may have. */
export const TENDER = {
  name: "Nine-metre tender",
  moves: "water",
  speed: "12 kn",
  power: {
    model: "table",
    rows: [
      { speed: "0 kn", rate: "1.2 kW" },
      { speed: "6 kn", rate: "9 kW" },
      { speed: "12 kn", rate: "61 kW" },
    ],
  },
  windage: { frontalArea: "7 m2", dragCoefficient: 0.9, efficiency: "60 %", airDensity: "1.225 kg/m3" },
  speeds: { min: "3 kn", max: "14 kn" },
  hotel: "0.8 kW",
  store: { capacity: "240 kWh", usable: "90 %" },
  limits: {
    wind: "13 m/s",
    gust: "18 m/s",
    groundSpeed: "3 kn",
    opposedWind: "8 m/s",
    opposedCurrent: "0.5 m/s",
  },
} satisfies CraftDocument;

/** Sound models of the other kinds. */
export const ROTOR = {
  model: "rotor",
  bladeProfilePower: "80 W",
  inducedPower: "88 W",
  tipSpeed: "120 m/s",
  hoverInducedSpeed: "4 m/s",
  fuselageDragRatio: 0.6,
  solidity: 0.05,
  discArea: "0.5 m2",
  mass: "2 kg",
} satisfies CraftDocument["power"];

export const WING = {
  model: "wing",
  mass: "14 kg",
  wingArea: "0.8 m2",
  zeroLiftDrag: 0.03,
  inducedFactor: 0.05,
  efficiency: "55 %",
} satisfies CraftDocument["power"];

export const CUBE = {
  model: "cube",
  reference: { speed: "13 kn", power: "3000 kW" },
} satisfies CraftDocument["power"];

/** A sound plan with every key. */
export const SUPPLY_RUN = {
  format: "legwork-plan/1",
  title: "Supply run to Skerrin",
  departure: "2027-05-04T06:00:00Z",
  craft: TENDER,
  pace: { hold: "through-speed", speed: "12 kn" },
  reserve: "20 %",
  fields: [
    { role: "current", file: "sound-current.csv" },
    {
      role: "wind",
      file: "sound-wind.csv",
      columns: { lon: "longitude" },
      gaps: "nearest",
      beyond: "stop",
      outside: "zero",
    },
  ],
  routes: [
    {
      name: "Outer",
      path: "geodesic",
      waypoints: [
        { name: "Quay", lat: 58.1032, lon: -6.3871 },
        { name: "Head", lat: "58°15.2'N", lon: "6°41.0'W", stay: "5 min" },
        { name: "Skerrin", lat: 58.402, lon: -7.05, path: "rhumb", speed: "8 kn", height: "60 m" },
      ],
    },
  ],
} satisfies PlanDocument;

/** Path of a key → its new value; `undefined` takes the key away. */
export type Change = readonly [path: string, value: unknown];

/** A deep copy with changes, each at a path as `routes[0].waypoints[1].lat`. */
export function changed(document: object, ...changes: readonly Change[]): unknown {
  const copy: unknown = structuredClone(document);
  for (const [path, value] of changes) {
    const keys = path.split(/[.[\]]+/).filter((key) => key !== "");
    const last = keys.pop() ?? "";
    const parent = keys.reduce<unknown>((at, key) => Reflect.get(at as object, key), copy) as object;
    if (value === undefined) Reflect.deleteProperty(parent, last);
    else Reflect.set(parent, last, structuredClone(value));
  }
  return copy;
}

/** Opens files held as text by their names. */
export function opener(files: Readonly<Record<string, string>> = {}): OpenFile {
  return async function* open(name) {
    const text = files[name];
    if (text === undefined) throw new InputError("there is no such file", { file: name });
    yield new TextEncoder().encode(text);
  };
}

/** Reads a plan whose craft, if in a file, is among `files`. */
export function read(document: unknown, files: Readonly<Record<string, string>> = {}): Promise<Plan> {
  return readPlan(JSON.stringify(document), { file: "run.plan.json", open: opener(files) });
}

/** The message of the InputError that reading ends in. Any other end fails. */
export async function faultOf(reading: () => Promise<unknown> | unknown): Promise<string> {
  try {
    await reading();
  } catch (error) {
    if (error instanceof InputError) return error.message;
    throw error;
  }
  throw new Error("read without a fault");
}

/** Holds a message to begin with its place: the key before a sentence about something else, or the subject of its own, never both. */
export function expectPlace(message: string, file: string, key: string): void {
  const name = key.slice(key.lastIndexOf(".") + 1);
  const isSubject = message.startsWith(`${file}: ${key} `);
  expect(isSubject || message.startsWith(`${file}, ${key}: `), message).toBe(true);
  const words = name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
  for (const twice of [name, words]) expect(message).not.toContain(`${key}: ${twice} `);
}

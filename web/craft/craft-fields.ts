import type { Dimension } from "../core.ts";

/** Where a value stands in a craft document: keys, and numbers for rows. */
export type CraftPath = readonly (string | number)[];

/** A value that the form asks for. */
export interface CraftField {
  readonly path: CraftPath;
  readonly label: string;
  /** What its unit may measure; empty for a bare number. */
  readonly dimensions: readonly Dimension[];
  /** The unit offered first. */
  readonly unit: string;
  /** What holds where it is left empty; left out where it must be given. */
  readonly otherwise?: string;
}

export interface CraftSection {
  readonly title: string;
  readonly fields: readonly CraftField[];
}

export type ModelName = "table" | "cube" | "rotor" | "wing" | "constant";

export const MODELS: readonly (readonly [ModelName, string])[] = [
  ["table", "table of speed and rate"],
  ["cube", "power law through one point"],
  ["rotor", "rotary wing"],
  ["wing", "fixed wing"],
  ["constant", "the same rate at every speed"],
];

export const RATES: readonly Dimension[] = ["power", "fuel rate by mass", "fuel rate by volume"];

/** The fields of each model; a table's rows are a table of their own. */
export const MODEL_FIELDS: Readonly<Record<ModelName, readonly CraftField[]>> = {
  table: [],
  cube: [
    needed("power.reference.speed", "Reference speed", ["speed"], "kn"),
    needed("power.reference.power", "Power there", ["power"], "kW"),
    bare("power.exponent", "Exponent", "3"),
  ],
  rotor: [
    needed("power.bladeProfilePower", "Blade profile power", ["power"], "W"),
    needed("power.inducedPower", "Induced power", ["power"], "W"),
    needed("power.tipSpeed", "Tip speed", ["speed"], "m/s"),
    needed("power.hoverInducedSpeed", "Hover induced speed", ["speed"], "m/s"),
    bare("power.fuselageDragRatio", "Fuselage drag ratio"),
    bare("power.solidity", "Solidity"),
    needed("power.discArea", "Disc area", ["area"], "m2"),
    optional("power.airDensity", "Air density", ["density"], "kg/m3", "1.225 kg/m3"),
    optional("power.efficiency", "Efficiency", ["share"], "%", "100 %"),
    optional("power.mass", "Mass", ["mass"], "kg", "for climbs"),
  ],
  wing: [
    needed("power.mass", "Mass", ["mass"], "kg"),
    needed("power.wingArea", "Wing area", ["area"], "m2"),
    bare("power.zeroLiftDrag", "Zero-lift drag"),
    bare("power.inducedFactor", "Induced factor"),
    needed("power.efficiency", "Efficiency", ["share"], "%"),
    optional("power.airDensity", "Air density", ["density"], "kg/m3", "1.225 kg/m3"),
  ],
  constant: [needed("power.rate", "Rate", RATES, "kW")],
};

export const SPEEDS: CraftSection = {
  title: "Speeds through the medium",
  fields: [
    optional("speed", "Ordered speed", ["speed"], "kn", "the pace's"),
    optional("speeds.min", "Least speed", ["speed"], "kn", "none"),
    optional("speeds.max", "Greatest speed", ["speed"], "kn", "none"),
  ],
};

export const WINDAGE: CraftSection = {
  title: "Windage",
  fields: [
    optional("windage.frontalArea", "Frontal area", ["area"], "m2", "no windage"),
    bare("windage.dragCoefficient", "Drag coefficient", "none"),
    optional("windage.efficiency", "Efficiency", ["share"], "%", "none"),
    optional("windage.airDensity", "Air density", ["density"], "kg/m3", "1.225 kg/m3"),
  ],
};

export const STORE: CraftSection = {
  title: "Store",
  fields: [
    needed("store.capacity", "Capacity", ["energy", "mass", "volume"], "kWh"),
    optional("store.usable", "Usable", ["share"], "%", "100 %"),
    optional(
      "store.specificConsumption",
      "Specific consumption",
      ["specific consumption"],
      "g/kWh",
      "for fuel",
    ),
    optional("store.density", "Density", ["density"], "kg/L", "for volumes"),
    optional("hotel", "Hotel load", RATES, "kW", "0"),
  ],
};

export const LIMITS: CraftSection = {
  title: "Limits",
  fields: [
    optional("limits.wind", "Greatest wind", ["speed"], "m/s", "none"),
    optional("limits.gust", "Greatest gust", ["speed"], "m/s", "none"),
    optional("limits.groundSpeed", "Least ground speed", ["speed"], "kn", "none"),
    optional("limits.opposedWind", "Wind against current from", ["speed"], "m/s", "8 m/s"),
    optional("limits.opposedCurrent", "… and current from", ["speed"], "m/s", "0.5 m/s"),
  ],
};

/** A path as messages name it: `power.rows[2].rate`. */
export function pathText(path: CraftPath): string {
  return path.reduce<string>(
    (text, part) => (typeof part === "number" ? `${text}[${part}]` : text === "" ? part : `${text}.${part}`),
    "",
  );
}

function needed(path: string, label: string, dimensions: readonly Dimension[], unit: string): CraftField {
  return { path: path.split("."), label, dimensions, unit };
}

function optional(
  path: string,
  label: string,
  dimensions: readonly Dimension[],
  unit: string,
  otherwise: string,
): CraftField {
  return { ...needed(path, label, dimensions, unit), otherwise };
}

function bare(path: string, label: string, otherwise?: string): CraftField {
  return { ...needed(path, label, [], ""), ...(otherwise === undefined ? {} : { otherwise }) };
}

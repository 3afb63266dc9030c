/** What a quantity measures. Each has one inner unit, see {@link INNER_UNITS}. */
export type Dimension =
  | "length"
  | "area"
  | "speed"
  | "time"
  | "mass"
  | "volume"
  | "force"
  | "energy"
  | "power"
  | "fuel rate by mass"
  | "fuel rate by volume"
  | "specific consumption"
  | "density"
  | "angle"
  | "temperature"
  | "share";

/** Unit of each dimension's figures inside: SI, but litres for a volume of fuel, degrees for an angle and 0..1 for a share. */
export const INNER_UNITS: Readonly<Record<Dimension, string>> = {
  length: "m",
  area: "m²",
  speed: "m/s",
  time: "s",
  mass: "kg",
  volume: "L",
  force: "N",
  energy: "J",
  power: "W",
  "fuel rate by mass": "kg/s",
  "fuel rate by volume": "L/s",
  "specific consumption": "kg/J",
  density: "kg/m³",
  angle: "°",
  temperature: "K",
  share: "1",
};

/** A unit: inner value = value · times / over + plus, with whole numbers so that one multiplication and one division round. */
export interface Unit {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly times: number;
  readonly over: number;
  readonly plus: number;
}

function unit(symbol: string, dimension: Dimension, times = 1, over = 1, plus = 0): Unit {
  return { symbol, dimension, times, over, plus };
}

/*
 * Exact by definition. NM and kn: International Extraordinary Hydrographic Conference, Monaco 1929 (1852 m). ft and lb:
 * international yard and pound agreement, 1959 (1 yd = 0.9144 m, 1 lb = 0.45359237 kg). min, h, d, L, t and the Celsius
 * scale: BIPM, SI Brochure, 9th edition (2019), table 8 and section 2.3.1.
 */
export const UNITS: readonly Unit[] = [
  unit("m", "length"),
  unit("km", "length", 1000),
  unit("NM", "length", 1852),
  unit("ft", "length", 3048, 10_000),
  unit("m2", "area"),
  unit("m/s", "speed"),
  unit("km/h", "speed", 1000, 3600),
  unit("kn", "speed", 1852, 3600),
  unit("ft/min", "speed", 3048, 600_000),
  unit("s", "time"),
  unit("min", "time", 60),
  unit("h", "time", 3600),
  unit("kg", "mass"),
  unit("t", "mass", 1000),
  unit("lb", "mass", 45_359_237, 100_000_000),
  unit("L", "volume"),
  unit("m3", "volume", 1000),
  unit("N", "force"),
  unit("kN", "force", 1000),
  unit("J", "energy"),
  unit("kJ", "energy", 1000),
  unit("MJ", "energy", 1_000_000),
  unit("Wh", "energy", 3600),
  unit("kWh", "energy", 3_600_000),
  unit("W", "power"),
  unit("kW", "power", 1000),
  unit("kg/h", "fuel rate by mass", 1, 3600),
  unit("t/d", "fuel rate by mass", 1000, 86_400),
  unit("L/h", "fuel rate by volume", 1, 3600),
  unit("g/kWh", "specific consumption", 1, 3_600_000_000),
  unit("kg/m3", "density"),
  unit("kg/L", "density", 1000),
  unit("deg", "angle"),
  unit("degC", "temperature", 1, 1, 273.15),
  unit("K", "temperature"),
  unit("%", "share", 1, 100),
];

/** Other spellings seen in the trade, only ever suggested, never read. */
export const SPELLINGS: Readonly<Record<string, string>> = {
  kt: "kn",
  kts: "kn",
  knot: "kn",
  knots: "kn",
  kmh: "km/h",
  kph: "km/h",
  nmi: "NM",
  feet: "ft",
  "m²": "m2",
  "m³": "m3",
  sec: "s",
  mins: "min",
  hr: "h",
  hrs: "h",
  hours: "h",
  lbs: "lb",
  litre: "L",
  litres: "L",
  "°": "deg",
  "°C": "degC",
  "kg/m³": "kg/m3",
  percent: "%",
};

import { InputError, type Place } from "../errors.ts";
import { foundText } from "../found.ts";

/** A coordinate's axis. */
export type Axis = "lat" | "lon";

const NAME = { lat: "latitude", lon: "longitude" } as const;
const LETTERS = { lat: "NS", lon: "EW" } as const;
const RANGE = { lat: "-90..90", lon: "-180..180 or 0..360" } as const;
const EXAMPLE = { lat: `50.358 or "50°21.5'N"`, lon: `-4.151 or "4°09.05'W"` } as const;

/** Typographic forms of a character, each read as the plain one. */
const PLAIN: readonly (readonly [RegExp, string])[] = [
  [/[\u2032\u2018\u2019\u00b4\u0060\u02b9]/g, "'"],
  [/[\u2033\u201c\u201d\u02ba]|''/g, '"'],
  [/[\u00ba\u02da\u2070]/g, "°"],
  [/[\u2212\u2010-\u2014]/g, "-"],
  [/\s+/g, " "],
];

// Degrees; then, each optional, minutes and seconds. The mark between two figures is that of the first, a blank, - or :.
const FIGURES =
  /^(\d+(?:\.\d+)?) ?°?(?:(?:(?<=°) ?| ?[-: ] ?)(\d+(?:\.\d+)?) ?'?(?:(?:(?<=') ?| ?[-: ] ?)(\d+(?:\.\d+)?) ?"?)?)?$/;

/**
 * Reads a latitude or longitude: a number in decimal degrees, north and east positive, or a text in decimal degrees,
 * degrees and decimal minutes, or degrees, minutes and seconds, with a hemisphere letter before or after, or signed.
 *
 * Read alike: `50°21.5'N`, `50 21.5 N`, `N50°21.5'`, `50-21.5n`, `50:21:30N`, `50°21′30″N`, `50.358N`, `+50.358`.
 *
 * @returns degrees: latitude -90..90, longitude -180..360
 * @throws InputError for any other text, the other axis's letter, a sign beside a letter, minutes and degrees without a
 *   hemisphere, minutes or seconds of 60 and more, or a value out of range
 * @see ISO 6709:2022, annex D, for the order of figures, marks and hemisphere
 * @example
 * parseCoordinate("50°21.5'N", "lat") // → 50.358333333333334
 * parseCoordinate("4 30 W", "lon") // → -4.5
 */
export function parseCoordinate(value: unknown, axis: Axis, place: Place = {}): number {
  const fault = (rule: string) => new InputError(`${NAME[axis]} ${rule}; found ${foundText(value)}`, place);
  const takes = `takes degrees, as ${EXAMPLE[axis]}`;
  if (typeof value !== "number" && typeof value !== "string") throw fault(takes);
  const degrees = typeof value === "number" ? value : degreesOf(value, axis, (rule) => fault(rule ?? takes));
  const [least, most] = axis === "lat" ? [-90, 90] : [-180, 360];
  if (!(degrees >= least && degrees <= most)) throw fault(`is in ${RANGE[axis]}`);
  return degrees === 0 ? 0 : degrees;
}

function degreesOf(text: string, axis: Axis, fault: (rule?: string) => InputError): number {
  const { figures, letter, sign } = signsOf(plain(text), axis, fault);
  const match = FIGURES.exec(figures);
  if (match === null) throw fault(/\d,\d/.test(figures) ? "takes a point as its decimal sign" : undefined);
  const [degrees, minutes, seconds] = [match[1], match[2], match[3]];
  if (minutes !== undefined && degrees?.includes(".")) throw fault("takes whole degrees before minutes");
  if (seconds !== undefined && minutes?.includes(".")) throw fault("takes whole minutes before seconds");
  if (Number(minutes ?? 0) >= 60) throw fault("takes minutes below 60");
  if (Number(seconds ?? 0) >= 60) throw fault("takes seconds below 60");
  if (minutes !== undefined && letter === "" && sign === "")
    throw fault(`takes a hemisphere, ${LETTERS[axis][0]} or ${LETTERS[axis][1]}, beside degrees and minutes`);
  const size = Number(degrees) + Number(minutes ?? 0) / 60 + Number(seconds ?? 0) / 3600;
  if (letter !== "" && size > (axis === "lat" ? 90 : letter === "W" ? 180 : 360))
    throw fault(`is in ${RANGE[axis]}`);
  return sign === "-" || letter === "S" || letter === "W" ? -size : size;
}

function plain(text: string): string {
  return PLAIN.reduce((result, [form, character]) => result.replace(form, character), text).trim();
}

/** Takes the hemisphere letter, before or after, or the sign off a coordinate. */
function signsOf(text: string, axis: Axis, fault: (rule?: string) => InputError) {
  const before = /^[NSEW]/i.exec(text)?.[0] ?? "";
  const after = before.length === text.length ? "" : (/[NSEW]$/i.exec(text)?.[0] ?? "");
  if (before !== "" && after !== "") throw fault("takes one hemisphere letter");
  const letter = (before + after).toUpperCase();
  if (letter !== "" && !LETTERS[axis].includes(letter))
    throw fault(`takes the hemisphere ${LETTERS[axis][0]} or ${LETTERS[axis][1]}`);
  const rest = text.slice(before.length, text.length - after.length).trim();
  const sign = /^[+-]/.exec(rest)?.[0] ?? "";
  if (sign !== "" && letter !== "") throw fault("takes a sign or a hemisphere letter, not both");
  return { figures: rest.slice(sign.length).trim(), letter, sign };
}

import type { StoreUnit } from "../craft/craft.ts";

const SECOND = 1000;
const MINUTE = 60_000;
/** Durations below are told in seconds, s. */
const IN_SECONDS = 120;

/*
 * How findings say an amount: SI first, the unit of the trade beside it, so that one text serves every door and unit preset.
 */

/** `15.2 m/s (29.5 kn)` */
export function speedText(speed: number, decimals = 1): string {
  return `${speed.toFixed(decimals)} m/s (${((speed * 3600) / 1852).toFixed(decimals)} kn)`;
}

/** A speed and the limit that it passes, with the decimals that tell them apart, four at most: `2.05 m/s (3.99 kn)`, `2.06 m/s (4.00 kn)` */
export function speedTexts(speed: number, limit: number): readonly [string, string] {
  const isApart = (decimals: number) =>
    [1, 3600 / 1852].every((unit) => (speed * unit).toFixed(decimals) !== (limit * unit).toFixed(decimals));
  const decimals = [1, 2, 3].find(isApart) ?? 4;
  return [speedText(speed, decimals), speedText(limit, decimals)];
}

/** `850 m`, `3.4 km (1.8 NM)` */
export function lengthText(metres: number): string {
  if (metres < 1000) return `${metres < 10 ? metres.toFixed(1) : metres.toFixed(0)} m`;
  return `${(metres / 1000).toFixed(1)} km (${(metres / 1852).toFixed(1)} NM)`;
}

/** An amount of a store: `1.24 kWh`, `350 Wh`, `12.4 t`, `820 kg`, `45.0 L` */
export function amountText(amount: number, unit: StoreUnit): string {
  if (unit === "L") return `${amount.toFixed(1)} L`;
  if (unit === "kg")
    return Math.abs(amount) >= 1000 ? `${(amount / 1000).toFixed(2)} t` : `${amount.toFixed(1)} kg`;
  const wattHours = amount / 3600;
  return Math.abs(wattHours) >= 1000 ? `${(wattHours / 1000).toFixed(2)} kWh` : `${wattHours.toFixed(1)} Wh`;
}

/** A moment given or reached, to the second: `2027-05-04 06:00 UTC`, `2027-05-04 06:00:20 UTC` */
export function momentText(milliseconds: number): string {
  const text = new Date(Math.round(milliseconds / SECOND) * SECOND).toISOString();
  return `${text.slice(0, 10)} ${text.slice(11, text.slice(17, 19) === "00" ? 16 : 19)} UTC`;
}

/** A moment worked out, to the nearest minute, as tables have it: `2027-05-04 06:00 UTC` */
export function minuteText(milliseconds: number): string {
  return momentText(Math.round(milliseconds / MINUTE) * MINUTE);
}

/** An arrival that misses the one asked for, to the second where {@link durationText} says by how many: `2027-05-04 05:59:40 UTC` */
export function missedArrivalText(arrival: number, seconds: number): string {
  return seconds < IN_SECONDS ? momentText(arrival) : minuteText(arrival);
}

/** By how much an arrival misses the one asked for: `12 min too late`, `40 s too early` */
export function missText(seconds: number, isLate: boolean): string {
  return `${durationText(seconds)} too ${isLate ? "late" : "early"}`;
}

/** `90 s`, `12 min`, `3 h 05 min` */
export function durationText(seconds: number): string {
  if (seconds < IN_SECONDS) return `${Math.round(seconds)} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 60) return `${minutes} min`;
  return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, "0")} min`;
}

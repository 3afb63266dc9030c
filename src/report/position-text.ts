import { reduceTurn } from "../geodesy/angle.ts";
import type { Units } from "./input.ts";

function degreesAndMinutes(value: number, degreeDigits: number, decimals: number, letters: string): string {
  const place = 10 ** decimals;
  // Whole units of the last place first, so that a minute never prints as 60.
  const count = Math.round(Math.abs(value) * 60 * place);
  const degrees = Math.floor(count / (60 * place));
  const minutes = (count - degrees * 60 * place) / place;
  const letter = value < 0 && count > 0 ? letters[1] : letters[0];
  const minuteText = minutes.toFixed(decimals).padStart(3 + decimals, "0");
  return `${String(degrees).padStart(degreeDigits, "0")}°${minuteText}'${letter}`;
}

function decimalDegrees(value: number, decimals: number, degreeDigits: number): string {
  const text = value.toFixed(decimals);
  return (Number(text) === 0 ? text.replace("-", "") : text).padStart(degreeDigits + decimals + 2);
}

/**
 * A position in degrees and decimal minutes (ISO 6709, annex D, in its form for reading), or in signed decimal degrees under
 * `metric`. `fine` gives a third decimal of the minute (about 2 m), or a sixth of the degree (about 0.1 m).
 */
export function positionText(lat: number, lon: number, units: Units, fine: boolean): string {
  const east = reduceTurn(lon);
  if (units === "metric") {
    const decimals = fine ? 6 : 4;
    return `${decimalDegrees(lat, decimals, 2)} ${decimalDegrees(east, decimals, 3)}`;
  }
  const decimals = fine ? 3 : 2;
  return `${degreesAndMinutes(lat, 2, decimals, "NS")} ${degreesAndMinutes(east, 3, decimals, "EW")}`;
}

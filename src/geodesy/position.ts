import { InputError } from "../errors.ts";
import type { Position } from "./track.ts";

/**
 * Checks a position before any geodesy is done with it.
 *
 * @param role what the position is, for the message, as `start`
 * @throws InputError if the latitude is not in -90..90 or the longitude is not a finite number
 */
export function requirePosition(position: Position, role: string): void {
  requireLatitude(position.lat, `latitude of the ${role}`);
  if (!Number.isFinite(position.lon)) {
    throw new InputError(`longitude of the ${role} is a finite number of degrees; found ${position.lon}`);
  }
}

/** @throws InputError if the latitude, degrees, is not in -90..90 */
export function requireLatitude(lat: number, quantity = "latitude"): void {
  if (!(lat >= -90 && lat <= 90)) throw new InputError(`${quantity} is in -90..90 degrees; found ${lat}`);
}

/** @throws InputError if the value is not a finite number */
export function requireFinite(value: number, quantity: string): void {
  if (!Number.isFinite(value)) throw new InputError(`${quantity} is a finite number; found ${value}`);
}

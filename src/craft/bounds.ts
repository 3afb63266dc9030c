import { InputError } from "../errors.ts";

/*
 * Range checks of physical parameters, each with the quantity named. They run once, when a model is built; inner loops trust.
 */

function show(value: number, unit: string): string {
  return unit === "" ? String(value) : `${value} ${unit}`;
}

/** Throws unless the value is finite and above zero. */
export function requirePositive(value: number, quantity: string, unit: string): number {
  if (!(value > 0 && Number.isFinite(value)))
    throw new InputError(`${quantity} is a finite number above 0; found ${show(value, unit)}`);
  return value;
}

/** Throws unless the value is finite and not below zero. */
export function requireNotNegative(value: number, quantity: string, unit: string): number {
  if (!(value >= 0 && Number.isFinite(value)))
    throw new InputError(`${quantity} is a finite number not below 0; found ${show(value, unit)}`);
  return value;
}

/** Throws unless the value is above zero and at most one. */
export function requireShare(value: number, quantity: string): number {
  if (!(value > 0 && value <= 1))
    throw new InputError(`${quantity} is above 0 and at most 1; found ${show(value, "")}`);
  return value;
}

/** Throws unless the value is finite. */
export function requireFinite(value: number, quantity: string, unit: string): number {
  if (!Number.isFinite(value))
    throw new InputError(`${quantity} is a finite number; found ${show(value, unit)}`);
  return value;
}

/** Largest speed whose square is still a finite number, with room to add two. */
const GREATEST_SPEED = 1e150;

/** Throws unless the value is finite and its square is, too. */
export function requireVelocity(value: number, quantity: string): number {
  if (!(Math.abs(value) <= GREATEST_SPEED))
    throw new InputError(`${quantity} is a finite number of at most ${GREATEST_SPEED}; found ${value}`);
  return value;
}

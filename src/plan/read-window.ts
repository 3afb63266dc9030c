import { type DepartureWindow, windowFault } from "../choose/departure-window.ts";
import type { Craft } from "../craft/craft.ts";
import { quoted } from "../found.ts";
import type { Fault } from "./first-issue.ts";
import type { PlanParts } from "./plan-schema.ts";
import { checkOrderedSpeed } from "./read-craft.ts";

/**
 * The window of a plan, checked against pace and craft.
 *
 * Errors: a window that {@link windowFault} refuses, speeds beside a pace that chooses its own, a speed outside the power table.
 */
export function windowOf(parts: PlanParts, craft: Craft, fault: Fault): DepartureWindow | undefined {
  const { window, pace } = parts;
  if (window === undefined) return undefined;
  const hold = pace !== undefined && "hold" in pace ? pace.hold : "through-speed";
  window.speeds?.forEach((speed, index) => {
    const path = ["window", "speeds", index];
    if (hold === "power" || hold === "least-energy")
      throw fault(
        path,
        `the pace ${quoted(hold)} chooses the speed itself, so a window names none; found ${quoted(speed.text)}`,
      );
    if (hold === "through-speed") checkOrderedSpeed(speed, craft.power, (text) => fault(path, text));
  });
  const read = {
    from: window.from,
    to: window.to,
    every_s: window.every.value,
    speeds_m_s: window.speeds?.map(({ value }) => value) ?? null,
    ...(window.arriveBy === undefined ? {} : { arriveBy: window.arriveBy }),
  };
  const wrong = windowFault(read, parts.routes.length);
  if (wrong !== null)
    throw fault(["window", ...(wrong.parts.length === 1 ? wrong.parts : [])], wrong.sentence);
  return read;
}

import { expect, test } from "vitest";
import { saidOnce } from "../../web/state/said-once.ts";

test.each([
  ["reserve: reserve takes a share", "reserve takes a share"],
  ["tender.craft.json, speed: speed is positive; found 0", "tender.craft.json: speed is positive; found 0"],
  [
    "routes[0].waypoints[2].lat: latitude is in -90..90; found 91",
    "routes[0].waypoints[2].lat: latitude is in -90..90; found 91",
  ],
  ["reserve: reserves differ", "reserve: reserves differ"],
])("the fault %j is said as %j", (fault, said) => {
  expect(saidOnce(fault)).toBe(said);
});

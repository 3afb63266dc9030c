import fc from "fast-check";
import { angleDifference, DEGREE } from "../../src/geodesy/angle.ts";
import { type Ellipsoid, meridionalRadius, transverseRadius } from "../../src/geodesy/ellipsoid.ts";
import type { Position } from "../../src/geodesy/track.ts";

/** Latitudes over the whole globe, the equator, the poles and their neighbourhoods more often than chance has them. */
const anyLatitude: fc.Arbitrary<number> = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: -90, max: 90, noNaN: true }) },
  { weight: 2, arbitrary: fc.constantFrom(0, 90, -90, 89.999999, -89.999999, 45, -1e-9, 1e-12) },
);

/** Longitudes as plans give them, -180..360, with the antimeridian and Greenwich more often. */
const anyLongitude: fc.Arbitrary<number> = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: -180, max: 360, noNaN: true }) },
  { weight: 2, arbitrary: fc.constantFrom(0, 180, -180, 179.999999, 359, 360, -90) },
);

export const anyPosition: fc.Arbitrary<Position> = fc.record({ lat: anyLatitude, lon: anyLongitude });

/** Positions short of the poles by at least `colatitude` degrees. */
export const awayFromPoles = (colatitude: number): fc.Arbitrary<Position> =>
  anyPosition.map(({ lat, lon }) => ({ lat: (lat * (90 - colatitude)) / 90, lon }));

/** Distance, m, between two places that are close together, whole turns of longitude apart or not. */
export function apart(ellipsoid: Ellipsoid, one: Position, two: Position): number {
  const north = (two.lat - one.lat) * DEGREE * meridionalRadius(ellipsoid, one.lat);
  const cos = Math.cos(Math.max(Math.abs(one.lat), Math.abs(two.lat)) * DEGREE);
  const east = angleDifference(one.lon, two.lon) * DEGREE * transverseRadius(ellipsoid, one.lat) * cos;
  return Math.hypot(north, east);
}

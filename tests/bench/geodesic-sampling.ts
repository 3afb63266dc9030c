import geographiclib from "geographiclib-geodesic";
import { STATIONS } from "../../src/estimate/gauss-kronrod.ts";
import type { PreparedLeg, PreparedRoute } from "../../src/estimate/prepare.ts";
import { layStations, makeStations } from "../../src/estimate/stations.ts";
import { faster, type Part } from "./comparison.ts";
import type { Ocean } from "./ocean.ts";
import { inProcess, type Timing, takeTurns } from "./timing.ts";

const { Geodesic } = geographiclib;
const PLACES = 20_000;
const NS = [1e-9, "ns"] as const;

/** Places and courses along one geodesic leg: a place a call. */
export async function geodesicSampling({ prepared }: Ocean): Promise<Part> {
  const { track, curve } = (prepared[2] as PreparedRoute).legs[0] as PreparedLeg;
  const { from, to, length } = track;
  const line = Geodesic.WGS84.InverseLine(from.lat, from.lon, to.lat, to.lon);
  const places = Float64Array.from({ length: PLACES }, (_, n) => (length * (n + 0.5)) / PLACES);
  const stations = makeStations();
  const stretches = Math.floor(PLACES / STATIONS);
  const timings = await takeTurns(
    [
      inProcess("track.at", PLACES, () => places.reduce((sum, s) => sum + track.at(s).lat, 0)),
      inProcess("fitted curve", stretches * STATIONS, () => {
        let sum = 0;
        const pieces = curve.starts.length - 1;
        for (let n = 0; n < stretches; n += 1) {
          const p = n % pieces;
          const start = curve.starts[p] as number;
          const size = ((curve.starts[p + 1] as number) - start) / stretches;
          layStations(stations, curve, p, start + n * size, start + (n + 1) * size);
          sum += (stations.lat[5] as number) + (stations.lon[5] as number) + (stations.sin[5] as number);
        }
        return sum;
      }),
      inProcess("GeodesicLine.Position", PLACES, () =>
        places.reduce((sum, s) => sum + (line.Position(s).lat2 as number), 0),
      ),
    ],
    15,
    3,
  );
  const [at, fitted, position] = timings as [Timing, Timing, Timing];
  return {
    comparisons: [
      faster("place on a track (track.at)", at, position, null, NS),
      faster("place on a track's fitted curve (layStations)", fitted, position, 3, NS),
    ],
    timings,
  };
}

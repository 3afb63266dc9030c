import { readFileSync } from "node:fs";
import { readGridFile } from "../../../src/field/csv.ts";
import type { Field } from "../../../src/field/field.ts";
import { mergeField } from "../../../src/field/merge.ts";
import { sampleField } from "../../../src/field/sample.ts";
import { routeOf, waypoint } from "../../estimate/fixtures.ts";
import { opened } from "../../field/read-text.ts";
import { flown } from "../legs.ts";
import { type Answers, endsOf, given } from "./catalogue.ts";

/** Two months of monthly mean winds, as handed over: values by time, latitude and longitude. */
interface TwoMonths {
  readonly time_iso: readonly string[];
  readonly lat: readonly number[];
  readonly lon: readonly number[];
  readonly u: readonly (readonly (readonly number[])[])[];
  readonly v: readonly (readonly (readonly number[])[])[];
}

const TWO_MONTHS = JSON.parse(
  readFileSync(new URL("../navy_winds_two_months.json", import.meta.url), "utf8"),
) as TwoMonths;
const ISO_TIMES = TWO_MONTHS.time_iso.map((text) => `${text.replace(" ", "T")}Z`);
const TIMES = ISO_TIMES.map((text) => Date.parse(text)) as [number, number];

/** The winds as a field file, its longitudes as they are (20 to 377.5): both months, or the first alone without a time. */
function fieldFile(months: "both" | "first"): string {
  const rows = [months === "both" ? "time,latitude,longitude,u,v" : "latitude,longitude,u,v"];
  TWO_MONTHS.u.slice(0, months === "both" ? 2 : 1).forEach((slice, t) => {
    slice.forEach((row, j) => {
      row.forEach((u, i) => {
        const place = `${TWO_MONTHS.lat[j]},${TWO_MONTHS.lon[i]}`;
        const vector = `${u},${TWO_MONTHS.v[t]?.[j]?.[i]}`;
        rows.push(months === "both" ? `${ISO_TIMES[t]},${place},${vector}` : `${place},${vector}`);
      });
    });
  });
  return rows.join("\n");
}

async function read(months: "both" | "first"): Promise<Field> {
  const bytes = new TextEncoder().encode(fieldFile(months));
  const grid = await readGridFile(opened(bytes, 65_536), { file: "navy-winds.csv", role: "wind" });
  return mergeField("wind", [{ grid, gaps: "stop", beyond: "stop", outside: "stop" }]);
}

let both: Promise<Field> | null = null;
async function wind(lat: number, lon: number, time: number): Promise<number[]> {
  both ??= read("both");
  const sample = sampleField(await both, lat, lon, null, time);
  if (sample.none !== null) throw new Error(`no wind at ${lat}, ${lon}: ${sample.none}`);
  return [sample.u, sample.v];
}
const MIDDLE = (TIMES[0] + TIMES[1]) / 2;

let crossing: Promise<ReturnType<typeof flown>> | null = null;
async function pacific() {
  crossing ??= read("first").then((field) => {
    const { from, to } = endsOf("GRID-02");
    const route = routeOf(waypoint("west", from.lat, from.lon), waypoint("east", to.lat, to.lon));
    return flown(route, { speed: given("GRID-02").tas_ms as number, fields: [field] });
  });
  return (await crossing).estimate.totals;
}

export const griddedWinds: Answers = {
  "GRID-01": {
    node_40N_40W_t0_uv: { words: "the node at 40 N 40 W", ours: () => wind(40, -40, TIMES[0]) },
    node_50S_80E_t1_uv: { words: "the node at 50 S 80 E, second month", ours: () => wind(-50, 80, TIMES[1]) },
    node_0N_0E_t0_uv: { words: "the node at 0 N 0 E, stored as 360 E", ours: () => wind(0, 0, TIMES[0]) },
    uv_41_3N_37_9W_t0: { words: "between nodes", ours: () => wind(41.3, -37.9, TIMES[0]) },
    uv_41_3N_37_9W_mid_time: { words: "between nodes and times", ours: () => wind(41.3, -37.9, MIDDLE) },
    uv_33_3N_179_4E_t0: { words: "beside the antimeridian", ours: () => wind(33.3, 179.4, TIMES[0]) },
    uv_12_5N_19E_t0: { words: "in the seam of the longitudes", ours: () => wind(12.5, 19, TIMES[0]) },
  },
  "GRID-02": {
    mean_along_track_ms: {
      words: "mean along-track wind across the Pacific",
      ours: async () => (await pacific()).wind?.meanAlongTrack_m_s as number,
    },
    time_s: { words: "time across the Pacific", ours: async () => (await pacific()).time_s as number },
    distance_m: { words: "distance across the Pacific", ours: async () => (await pacific()).distance_m },
  },
};

/**
 * The three scenarios once more, with what is decided on top of an estimate: when to leave, how far one can turn back, how sure.
 */
import { ISLANDS_PLAN } from "./islands.mjs";
import { OCEAN_PLAN } from "./ocean.mjs";
import { SURVEY_PLAN } from "./survey.mjs";

/**
 * A plan with more keys, its routes last, where they are read best.
 * @template {{ routes: readonly object[] }} Plan
 * @param {Plan} plan @param {Record<string, unknown>} more
 */
function deciding({ routes, ...plan }, more) {
  return { ...plan, ...more, routes };
}

export const ISLANDS_DECIDE = deciding(ISLANDS_PLAN, {
  fields: [
    {
      role: "current",
      file: "islands-current.csv",
      error: { speed: "0.15 m/s", length: "10 km", time: "3 h" },
    },
    { role: "wind", file: "islands-wind-members.csv" },
  ],
  window: { from: "2027-05-04T09:00Z", to: "2027-05-04T16:00Z", every: "1 h" },
  alternates: [
    { name: "Orrin quay", lat: 53.559, lon: -13.568 },
    { name: "Vessay pier", lat: 53.545, lon: -13.755 },
  ],
  whatIf: [
    { name: "Stream a tenth stronger", current: 1.1 },
    { name: "Cold battery", consumption: "5 %" },
    { name: "An hour late", late: "1 h" },
  ],
});

export const SURVEY_DECIDE = deciding(SURVEY_PLAN, {
  // The members are of the whole night; the error is of what is smaller than their grid and shorter than their step.
  fields: [
    {
      role: "wind",
      file: "survey-wind-members.csv",
      error: { speed: "0.8 m/s", length: "5 km", time: "1 h" },
    },
  ],
  confidence: "95 %",
  window: { from: "2027-09-13T22:30Z", to: "2027-09-14T01:45Z", every: "15 min" },
  alternates: [{ name: "Strip", lat: -28.61, lon: 134.36, height: "10 m" }],
  whatIf: [
    { name: "Wind a tenth stronger", wind: 1.1 },
    { name: "One m/s faster", speed: "1 m/s" },
    { name: "Half an hour earlier", late: "-30 min" },
  ],
});

export const OCEAN_DECIDE = deciding(OCEAN_PLAN, {
  reserve: "74.5 t",
  fields: [
    { role: "wind", file: "ocean-wind-1.csv", member: 0 },
    { role: "wind", file: "ocean-wind-2.csv", member: 0 },
    ...[1, 2, 3, 4].map((member) => ({ role: "wind", file: `ocean-wind-member-${member}.csv`, member })),
    {
      role: "current",
      file: "ocean-current.csv",
      error: { speed: "0.2 m/s", length: "120 km", time: "96 h" },
    },
  ],
  window: {
    from: "2027-11-03T00:00Z",
    to: "2027-11-05T00:00Z",
    every: "6 h",
    speeds: ["12 kn", "12.5 kn", "13 kn"],
  },
  alternates: [{ name: "Mid isle", lat: 38, lon: 170 }],
  whatIf: [
    { name: "Jet a fifth weaker", current: 0.8 },
    { name: "Half a knot slower", speed: "-0.5 kn" },
    { name: "Fouled hull", consumption: "5 %" },
  ],
});

import type { PlanDocument } from "../state/plan-document.ts";

/** What the page shows before the demo is joined. All of it is invented. */
export const FIRST_PLAN: PlanDocument = {
  format: "legwork-plan/1",
  title: "Supply run to Skerrin",
  departure: "2027-05-04T06:00:00Z",
  craft: { name: "Nine-metre tender", moves: "water" },
  pace: { hold: "through-speed", speed: "12 kn" },
  reserve: "20 %",
  fields: [
    { role: "current", file: "sound-current.csv" },
    { role: "wind", file: "sound-wind.csv" },
  ],
  routes: [
    {
      name: "Outer",
      waypoints: [
        { name: "Quay", lat: 58.1032, lon: -6.3871 },
        { name: "Head", lat: "58°15.2'N", lon: "6°41.0'W", stay: "5 min" },
        { name: "Stack", lat: 58.44, lon: -6.86 },
        { name: "Skerrin", lat: 58.402, lon: -7.05, path: "rhumb", speed: "8 kn" },
      ],
    },
    {
      name: "Inner",
      waypoints: [
        { name: "Quay", lat: 58.1032, lon: -6.3871 },
        { name: "Narrows", lat: 58.17, lon: -6.74 },
        { name: "Skerrin", lat: 58.402, lon: -7.05 },
      ],
    },
    {
      name: "Outer, wide",
      waypoints: [
        { name: "Quay", lat: 58.1032, lon: -6.3871 },
        { name: "Fairway", lat: 58.26, lon: -6.35 },
        { name: "Turn", lat: 58.49, lon: -6.62 },
        { name: "Skerrin", lat: 58.402, lon: -7.05 },
      ],
    },
  ],
};

/**
 * The recipe of every file in this folder. `node data/demo/recipe.mjs` writes them again, byte for byte.
 */
import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { ISLANDS_DECIDE, OCEAN_DECIDE, SURVEY_DECIDE } from "./recipe/decide.mjs";
import {
  ISLANDS_PLAN,
  islandsCurrent,
  islandsWind,
  islandsWindMembers,
  WORKBOAT,
} from "./recipe/islands.mjs";
import { OCEAN_PLAN, oceanCurrent, oceanWind, oceanWindMember, SHIP } from "./recipe/ocean.mjs";
import { DRONE, SURVEY_PLAN, surveyWind, surveyWindMembers } from "./recipe/survey.mjs";

/** The seed of all random parts. */
export const SEED = 20270504;

/** @param {unknown} value */
const json = (value) => `${JSON.stringify(value, null, 2)}\n`;

/**
 * Text of each demo file by name.
 * @param {number} seed
 * @returns {Record<string, string>}
 */
export function demoFiles(seed = SEED) {
  return {
    "islands.plan.json": json(ISLANDS_PLAN),
    "workboat.craft.json": json(WORKBOAT),
    "islands-current.csv": islandsCurrent(seed),
    "islands-wind.csv": islandsWind(seed),
    "islands-decide.plan.json": json(ISLANDS_DECIDE),
    "islands-wind-members.csv": islandsWindMembers(seed),
    "survey.plan.json": json(SURVEY_PLAN),
    "drone.craft.json": json(DRONE),
    "survey-wind.csv": surveyWind(seed),
    "survey-decide.plan.json": json(SURVEY_DECIDE),
    "survey-wind-members.csv": surveyWindMembers(seed),
    "ocean.plan.json": json(OCEAN_PLAN),
    "ship.craft.json": json(SHIP),
    "ocean-wind-1.csv": oceanWind(seed, { from: 0, to: 102 }),
    "ocean-wind-2.csv": oceanWind(seed, { from: 108, to: 216 }),
    "ocean-current.csv": oceanCurrent(seed),
    "ocean-decide.plan.json": json(OCEAN_DECIDE),
    ...Object.fromEntries(
      [1, 2, 3, 4].map((member) => [`ocean-wind-member-${member}.csv`, oceanWindMember(seed, member)]),
    ),
  };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  for (const [name, text] of Object.entries(demoFiles())) {
    writeFileSync(new URL(name, import.meta.url), text);
  }
}

/*
 * What makes land of a coastline, apart from the rest of the core, since it is loaded together with the coastline.
 */
export { prepareLand } from "./core.ts";

/*
 * What makes land of a coastline and finds it on a route, apart from the rest of the core, since it is loaded together with the coastline.
 */
export { landFinder, prepareLand } from "./core.ts";

/*
 * Beside the public surface, not through it: help and version must not wait for the whole core to load.
 */
export { ADVISORY } from "../constants.ts";

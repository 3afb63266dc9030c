/*
 * What reads field files and makes fields of them, apart from the rest of the core: the worker loads it with the first field.
 */
export { fileKind, inspectField, inspectGrid, mergeSources, readGridFile, roleSource } from "./core.ts";

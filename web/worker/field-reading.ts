/*
 * What reads field files, apart from the rest of the core: the worker loads it with the first field.
 */
export { fileKind, inspectField, inspectGrid, readGridFile } from "./core.ts";

/*
 * What reads archives, apart from the rest of the core: the command loads it for an archive alone.
 */
export { readArchive } from "../index.ts";

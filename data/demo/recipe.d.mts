/** The seed of all random parts of the demo scenarios. */
export const SEED: number;
/** Text of each demo file by name; the same seed gives the same bytes. */
export function demoFiles(seed?: number): Record<string, string>;

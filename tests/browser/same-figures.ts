const NUMBER = /-?\d+(?:\.\d+)?(?:e[-+]?\d+)?/g;

/**
 * Where two reports first differ: in their words at all, or in a figure by more than engines may differ. `null` where they agree.
 *
 * Engines compute sine, cosine and their like to within a last bit or two, each its own; the browser and Node here differ by up to
 * 4e-9 in integrals of 1e5 and by 1e-10 s in differences of times.
 */
export function firstDifference(found: string, expected: string): string | null {
  const words = [found, expected].map((text) => text.replaceAll(NUMBER, "#").split("\n"));
  const line = words[1]?.findIndex((text, at) => text !== words[0]?.[at]) ?? -1;
  if (line !== -1) return `line ${line + 1}: ${found.split("\n")[line]} for ${expected.split("\n")[line]}`;
  if (words[0]?.length !== words[1]?.length) return `${words[0]?.length} lines for ${words[1]?.length}`;
  const [ours, theirs] = [found, expected].map((text) => text.match(NUMBER) ?? []);
  const at = theirs?.findIndex((figure, index) => !agree(Number(ours?.[index]), Number(figure))) ?? -1;
  return at === -1 ? null : `figure ${at + 1}: ${ours?.[at]} for ${theirs?.[at]}`;
}

function agree(found: number, expected: number): boolean {
  // Bounds on the numerical error, differences of nearly equal figures, are all that is so small: seen to differ by 0.1 %.
  const share = Math.abs(expected) < 1e-3 ? 1e-2 : 1e-11;
  return Math.abs(found - expected) <= 1e-9 + share * Math.abs(expected);
}

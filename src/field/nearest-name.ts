/**
 * The candidate that takes the fewest insertions, deletions and replacements to become what was found (Levenshtein, Soviet
 * Physics Doklady 10, 1966), whatever the letters' case; `null` where even that takes more than a third of its length.
 */
export function nearestName(found: string, candidates: readonly string[]): string | null {
  let nearest: string | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const candidate of candidates) {
    const distance = editDistance(found.toLowerCase(), candidate.toLowerCase());
    if (distance < least && distance <= Math.max(1, candidate.length / 3)) {
      nearest = candidate;
      least = distance;
    }
  }
  return nearest;
}

function editDistance(a: string, b: string): number {
  let above = Array.from({ length: b.length + 1 }, (_, column) => column);
  for (let row = 1; row <= a.length; row++) {
    const current = [row];
    for (let column = 1; column <= b.length; column++) {
      const replaced = (above[column - 1] as number) + (a[row - 1] === b[column - 1] ? 0 : 1);
      current.push(Math.min(replaced, (above[column] as number) + 1, (current[column - 1] as number) + 1));
    }
    above = current;
  }
  return above[b.length] as number;
}

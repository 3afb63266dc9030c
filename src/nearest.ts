/**
 * The known name that takes the fewest insertions, deletions, replacements and exchanges of neighbours to become the one
 * found (optimal string alignment: Damerau, Comm. ACM 7, 1964; Levenshtein, Soviet Physics Doklady 10, 1966), whatever the
 * letters' case; the first of equals, with its distance.
 *
 * @param known at least one
 */
export function nearest(
  found: string,
  known: readonly string[],
): { readonly name: string; readonly distance: number } {
  let name = known[0] ?? "";
  let least = Number.POSITIVE_INFINITY;
  // A longer text is further from every name than any name is long; cutting it bounds the work and not the order.
  const wanted = found.slice(0, 80).toLowerCase();
  for (const candidate of known) {
    const distance = alignmentDistance(wanted, candidate.toLowerCase());
    if (distance < least) {
      name = candidate;
      least = distance;
    }
  }
  return { name, distance: least };
}

function alignmentDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1];
      let least = Math.min(at(last, j - 1) + (same ? 0 : 1), at(last, j) + 1, at(row, j - 1) + 1);
      const exchanged = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (exchanged) least = Math.min(least, at(beforeLast, j - 2) + 1);
      row.push(least);
    }
    beforeLast = last;
    last = row;
  }
  return at(last, b.length);
}

function at(row: readonly number[], j: number): number {
  return row[j] ?? Number.POSITIVE_INFINITY;
}

import { seeded } from "../seeded.ts";

/** Lower triangle L with L Lᵀ = C, row by row (Cholesky). @param covariance of nodes i and j */
export function cholesky(size: number, covariance: (i: number, j: number) => number): Float64Array[] {
  const rows: Float64Array[] = [];
  for (let i = 0; i < size; i += 1) {
    const row = new Float64Array(i + 1);
    for (let j = 0; j <= i; j += 1) {
      const other = j === i ? row : (rows[j] as Float64Array);
      let sum = covariance(i, j);
      for (let k = 0; k < j; k += 1) sum -= (row[k] as number) * (other[k] as number);
      row[j] = i === j ? Math.sqrt(sum) : sum / (other[j] as number);
    }
    rows.push(row);
  }
  return rows;
}

/** Standard normal numbers (Box & Muller, Annals of Mathematical Statistics 29, 1958). */
export function normals(seed: number): () => number {
  const random = seeded(seed);
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** One sample of the errors at all nodes. */
export function sampleOf(root: readonly Float64Array[], normal: () => number): Float64Array {
  const free = Float64Array.from(root, normal);
  const sample = new Float64Array(root.length);
  for (const [i, row] of root.entries()) {
    let sum = 0;
    for (let k = 0; k <= i; k += 1) sum += (row[k] as number) * (free[k] as number);
    sample[i] = sum;
  }
  return sample;
}

export function deviationOf(values: readonly number[]): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
}

/** Value at x of the Lagrange polynomial of node j: the one that is 1 there and 0 at the other nodes. */
export function lagrangeAt(nodes: ArrayLike<number>, j: number, x: number): number {
  const own = nodes[j] as number;
  let product = 1;
  for (let m = 0; m < nodes.length; m += 1) {
    const other = nodes[m] as number;
    if (m !== j) product *= (x - other) / (own - other);
  }
  return product;
}

/**
 * Coefficients of the Lagrange polynomials of some nodes: row t, column n of the square matrix is the coefficient of x^t in
 * the polynomial that is 1 at node n and 0 at the others.
 */
export function lagrangeCoefficients(nodes: ArrayLike<number>): Float64Array {
  const count = nodes.length;
  const matrix = new Float64Array(count * count);
  for (let node = 0; node < count; node += 1) {
    const own = nodes[node] as number;
    let powers = [1];
    for (let other = 0; other < count; other += 1) {
      if (other === node) continue;
      const root = nodes[other] as number;
      powers = timesLinear(powers, root, own - root);
    }
    powers.forEach((value, term) => {
      matrix[term * count + node] = value;
    });
  }
  return matrix;
}

/** Coefficients of p(x) (x - root) / scale. */
function timesLinear(powers: readonly number[], root: number, scale: number): number[] {
  return Array.from(
    { length: powers.length + 1 },
    (_, term) => ((powers[term - 1] ?? 0) - root * (powers[term] ?? 0)) / scale,
  );
}

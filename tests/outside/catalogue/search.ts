/** The place between a and b where a quantity changes sign, by bisection to the last bit. */
export function rootBetween(a: number, b: number, of: (x: number) => number): number {
  let [low, high] = [a, b];
  const negativeBelow = of(low) < 0;
  for (let step = 0; step < 200; step += 1) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (of(middle) < 0 === negativeBelow) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

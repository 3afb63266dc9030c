/** Share of the golden section: (3 - √5)/2. */
const GOLDEN = 0.5 * (3 - Math.sqrt(5));
const MOST_STEPS = 100;
/** Share of x to which the place is found: about the square root of the rounding error, beyond which values do not differ. */
const CLOSENESS = 3e-9;

/**
 * The place between `low` and `high` where a function with one valley there is least: parabolic steps where they are safe,
 * else the golden section; R. P. Brent, Algorithms for Minimization without Derivatives (1973), chapter 5. It may be
 * infinite where the function has no value. Never worse than `best`.
 *
 * @param best a place between the two whose value is known to be finite
 */
export function leastOf(of: (x: number) => number, low: number, best: number, high: number): number {
  let a = low;
  let b = high;
  let x = best > low && best < high ? best : low + GOLDEN * (high - low);
  let fx = of(x);
  const start = { x: best, value: x === best ? fx : of(best) };
  let w = x;
  let v = x;
  let fw = fx;
  let fv = fx;
  let last = 0;
  let step = 0;
  for (let n = 0; n < MOST_STEPS; n += 1) {
    const middle = 0.5 * (a + b);
    const near = CLOSENESS * Math.abs(x) + Number.MIN_VALUE;
    if (Math.abs(x - middle) <= 2 * near - 0.5 * (b - a)) break;
    const parabola = parabolicStep(x, fx, w, fw, v, fv);
    const safe =
      Math.abs(parabola) < Math.abs(0.5 * last) && x + parabola > a + near && x + parabola < b - near;
    last = safe ? step : (x < middle ? b : a) - x;
    step = safe ? parabola : GOLDEN * last;
    const u = x + (Math.abs(step) >= near ? step : Math.sign(step) * near);
    const fu = of(u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      [v, fv, w, fw, x, fx] = [w, fw, x, fx, u, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) [v, fv, w, fw] = [w, fw, u, fu];
      else if (fu <= fv || v === x || v === w) [v, fv] = [u, fu];
    }
  }
  return start.value <= fx ? start.x : x;
}

/** From x to the foot of the parabola through three points; NaN where there is none, which no comparison takes for safe. */
function parabolicStep(x: number, fx: number, w: number, fw: number, v: number, fv: number): number {
  const r = (x - w) * (fx - fv);
  const q = (x - v) * (fx - fw);
  return ((x - v) * q - (x - w) * r) / (-2 * (q - r));
}

/**
 * Seeded numbers for the demo fields: the same seed gives the same bytes everywhere.
 */

/**
 * Uniform numbers in [0, 1) by a 32-bit multiply-xorshift mix over a Weyl sequence (the finaliser of MurmurHash3).
 * @param {number} seed an integer
 * @returns {() => number}
 */
function uniform(seed) {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 2 ** 32;
  };
}

/**
 * Standard normal numbers for the members of an ensemble (Box & Muller, Ann. Math. Statist. 29, 1958, 610-611): a row a member,
 * the first, the control, all zero, then pairs of opposite sign, so that the members' mean is the control.
 * @param {number} seed
 * @param {{ pairs: number, numbers: number }} shape
 * @returns {number[][]}
 */
export function mirroredNormals(seed, { pairs, numbers }) {
  const next = uniform(seed);
  const normal = () => Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next());
  const half = Array.from({ length: pairs }, () => Array.from({ length: numbers }, normal));
  const none = Array.from({ length: numbers }, () => 0);
  return [none, ...half.flatMap((row) => [row, row.map((value) => -value)])];
}

/**
 * A smooth random function of two coordinates in km: a sum of plane waves of random direction, length and phase, with
 * slopes of about `slope` per km (root mean square). As a stream function it gives eddies of that speed.
 * @param {number} seed
 * @param {{ shortest: number, longest: number, slope: number, waves?: number }} shape wavelengths in km
 * @returns {(x: number, y: number) => number}
 */
export function smoothRandom(seed, { shortest, longest, slope, waves = 12 }) {
  const next = uniform(seed);
  const terms = Array.from({ length: waves }, () => {
    const direction = 2 * Math.PI * next();
    const k = (2 * Math.PI) / (shortest * (longest / shortest) ** next());
    const phase = 2 * Math.PI * next();
    // A wave a·sin(k·x) has the mean square slope a²k²/2.
    return {
      kx: k * Math.cos(direction),
      ky: k * Math.sin(direction),
      phase,
      a: (slope / k) * Math.sqrt(2 / waves),
    };
  });
  return (x, y) => terms.reduce((sum, w) => sum + w.a * Math.sin(w.kx * x + w.ky * y + w.phase), 0);
}

/**
 * Latitudes that turn the ellipsoid into a sphere: the rectifying latitude µ, whose arcs are proportional to the
 * meridian's, and the isometric latitude ψ, the ordinate of Mercator's chart. All angles here are in radians.
 *
 * Sources: C. F. F. Karney, "On auxiliary latitudes", arXiv:2212.05818 (2023), for the series in the third flattening n,
 * and "The area of rhumb polygons", arXiv:2303.03219 (2023), for divided differences (called slopes here), which stay
 * accurate where the two latitudes meet. The formulas below are derived where they stand.
 */

/** µ - φ and φ - µ as sine series: element k - 1 is the coefficient of sin 2kφ, or of sin 2kµ. */
export interface RectifyingSeries {
  /** Mean radius of the meridian over (a + b) / 2: the quarter meridian is π/4 (a + b) times this. */
  readonly scale: number;
  readonly fromGeodetic: readonly number[];
  readonly toGeodetic: readonly number[];
}

/** Highest harmonic kept. At n = 0.01 (f = 1/50) the next term of either series is below 1e-17. */
const ORDER = 10;

/** Samples of the reversion integral: it converges as n^(SAMPLES - ORDER), far below rounding for |n| <= 0.01. */
const SAMPLES = 40;

/** Coefficients smaller than this, rad, move a place on the Earth by less than 0.2 nm; the reversion is only sure to 2e-18. */
const NEGLIGIBLE = 2e-17;

/**
 * The series between geodetic and rectifying latitude for third flattening n, to rounding for |n| <= 0.01.
 *
 * The meridian's radius of curvature is (a + b)/2 (1 - n²)² (1 + 2n cos 2φ + n²)^(-3/2), and
 * 1 + 2n cos 2φ + n² = (1 + n e^{2iφ}) (1 + n e^{-2iφ}). The product of the two binomial series gives the Fourier
 * series of the radius, and its integral gives µ (Helmert 1880).
 */
export function rectifyingSeries(n: number): RectifyingSeries {
  const scale = (1 - n * n) ** 2 * meridianHarmonic(n, 0);
  const fromGeodetic: number[] = [];
  for (let k = 1; k <= ORDER; k++) {
    fromGeodetic.push(meridianHarmonic(n, k) / (k * meridianHarmonic(n, 0)));
  }
  const toGeodetic = revertSeries(fromGeodetic);
  return { scale, fromGeodetic: trimSeries(fromGeodetic), toGeodetic: trimSeries(toGeodetic) };
}

/** Coefficient of cos 2kφ in (1 + 2n cos 2φ + n²)^(-3/2), halved for k > 0: the sum over j of g_j g_{j+k} n^{2j+k}. */
function meridianHarmonic(n: number, k: number): number {
  let power = n ** k;
  let lower = 1;
  let upper = 1;
  for (let j = 1; j <= k; j++) upper *= -(j + 0.5) / j;
  let sum = 0;
  for (let j = 0; j <= ORDER; j++) {
    sum += lower * upper * power;
    // g_j = binomial(-3/2, j), so g_{j+1} = -g_j (j + 3/2) / (j + 1).
    lower *= -(j + 1.5) / (j + 1);
    upper *= -(j + k + 1.5) / (j + k + 1);
    power *= n * n;
  }
  return sum;
}

/**
 * Coefficients of φ - µ in sin 2kµ from those of µ - φ in sin 2kφ (reversion of the series).
 *
 * Integrating the Fourier integral by parts gives d_k = (1/kπ) ∫ cos 2kµ(φ) dφ over 0..π; the trapezium rule is exact
 * to rounding for such a smooth periodic integrand. It gives what Lagrange's theorem gives, and
 * for every order without a table.
 */
function revertSeries(coefficients: readonly number[]): number[] {
  return coefficients.map((_, index) => {
    const k = index + 1;
    let sum = 0;
    for (let i = 0; i < SAMPLES; i++) {
      const phi = (i * Math.PI) / SAMPLES;
      // cos 2kµ - cos 2kφ in product form: the mean of cos 2kφ is zero, and leaving it out keeps small terms exact.
      const shift = sineSeries(coefficients, phi);
      sum += -2 * Math.sin(k * (2 * phi + shift)) * Math.sin(k * shift);
    }
    return sum / (k * SAMPLES);
  });
}

function trimSeries(coefficients: readonly number[]): number[] {
  let length = coefficients.length;
  while (length > 0 && Math.abs(coefficients[length - 1] as number) <= NEGLIGIBLE) length--;
  return coefficients.slice(0, length);
}

/** Sum of c_k sin 2kx, by Clenshaw's recurrence. */
export function sineSeries(coefficients: readonly number[], x: number): number {
  const twice = 2 * Math.cos(2 * x);
  let next = 0;
  let afterNext = 0;
  for (let k = coefficients.length - 1; k >= 0; k--) {
    const current = (coefficients[k] as number) + twice * next - afterNext;
    afterNext = next;
    next = current;
  }
  return next * Math.sin(2 * x);
}

/**
 * Slope of x + Σ c_k sin 2kx between x₁ and x₂: its difference there over x₂ - x₁, accurate for any distance between
 * the two and equal to the derivative where they coincide. From sin 2kx₂ - sin 2kx₁ = 2 cos k(x₁ + x₂) sin k(x₂ - x₁).
 *
 * @param sum x₁ + x₂
 * @param difference x₂ - x₁
 */
export function seriesSlope(coefficients: readonly number[], sum: number, difference: number): number {
  const cosSum = 2 * Math.cos(sum);
  const cosDifference = 2 * Math.cos(difference);
  let cosine = 1;
  let previousCosine = cosSum / 2;
  let quotient = 0;
  // q_k = sin(kδ)/δ obeys the same recurrence as cos kσ; here it runs from k = -1.
  let previousQuotient = difference === 0 ? -1 : -Math.sin(difference) / difference;
  let slope = 0;
  for (let k = 0; k < coefficients.length; k++) {
    const nextCosine = cosSum * cosine - previousCosine;
    const nextQuotient = cosDifference * quotient - previousQuotient;
    previousCosine = cosine;
    previousQuotient = quotient;
    cosine = nextCosine;
    quotient = nextQuotient;
    slope += (coefficients[k] as number) * cosine * quotient;
  }
  return 1 + 2 * slope;
}

/** Isometric latitude ψ = asinh tan φ - e atanh(e sin φ), rad; unbounded toward the poles. */
export function isometricLatitude(e2: number, sin: number, cos: number): number {
  return Math.asinh(sin / cos) - eccentricPart(e2, sin);
}

/** Latitudes closer than this, rad, are one: below 1e-300 numbers lose their precision, and quotients of them are void. */
const COINCIDENT = 1e-290;

/**
 * Slope of the isometric latitude between two geodetic latitudes: (ψ₂ - ψ₁) / (φ₂ - φ₁), accurate for any distance
 * between the two and equal to dψ/dφ where they coincide. Neither may be a pole.
 *
 * @param e2 square of the eccentricity
 * @param difference φ₂ - φ₁
 * @param sinHalf sin((φ₂ - φ₁)/2)
 * @param cosMean cos((φ₁ + φ₂)/2)
 */
export function isometricSlope(
  e2: number,
  sin1: number,
  cos1: number,
  sin2: number,
  cos2: number,
  difference: number,
  sinHalf: number,
  cosMean: number,
): number {
  if (Math.abs(difference) < COINCIDENT) return (1 - e2) / (cos1 * (1 - e2 * sin1 * sin1));
  // On the sphere ψ₂ - ψ₁ = atanh((sin φ₂ - sin φ₁) / (1 - sin φ₁ sin φ₂)) = 2 atanh(sin((φ₂-φ₁)/2) / cos((φ₁+φ₂)/2)).
  // The quotient nears 1 where the latitudes are far apart; there the plain difference loses nothing.
  const quotient = sinHalf / cosMean;
  const spherical =
    Math.abs(quotient) < 0.5 ? 2 * Math.atanh(quotient) : Math.asinh(sin2 / cos2) - Math.asinh(sin1 / cos1);
  const sineDifference = 2 * sinHalf * cosMean;
  const eccentric = eccentricPart(e2, sineDifference / (1 - e2 * sin1 * sin2));
  return (spherical - eccentric) / difference;
}

/** e atanh(e x), real for a prolate ellipsoid too, whose e² is negative. */
function eccentricPart(e2: number, x: number): number {
  if (e2 === 0) return 0;
  if (e2 > 0) {
    const e = Math.sqrt(e2);
    return e * Math.atanh(e * x);
  }
  const e = Math.sqrt(-e2);
  return -e * Math.atan(e * x);
}

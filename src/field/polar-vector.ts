/**
 * Sine and cosine of an angle in degrees, exact at every multiple of 90°: the angle is brought within 45° of one before
 * it becomes radians, so that a wind from due south has no eastward component at all.
 */
export function sinCosDegrees(angle: number): readonly [sine: number, cosine: number] {
  const turned = angle % 360;
  const quarter = Math.round(turned / 90);
  const rest = ((turned - 90 * quarter) * Math.PI) / 180;
  const sine = Math.sin(rest);
  const cosine = Math.cos(rest);
  switch (((quarter % 4) + 4) % 4) {
    case 0:
      return [sine, cosine];
    case 1:
      return [cosine, -sine];
    case 2:
      return [-sine, -cosine];
    default:
      return [-cosine, sine];
  }
}

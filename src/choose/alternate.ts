/** A place to go to in place of the destination. */
export interface Alternate {
  readonly name: string;
  /** Degrees, north positive. */
  readonly lat: number;
  /** Degrees, east positive, -180..360. */
  readonly lon: number;
  /** Height above the surface there, m; `null` for that of the place where the craft turns off. */
  readonly height_m: number | null;
}

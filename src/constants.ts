/** Semi-major axis of WGS84, m. NGA.STND.0036 (2014), table 3.1. */
export const WGS84_A = 6378137;

/** Flattening of WGS84. NGA.STND.0036 (2014), table 3.1. */
export const WGS84_F = 1 / 298.257223563;

/** Standard acceleration of free fall g₀, m/s². BIPM, SI Brochure (2019), section 2.3.1 note; CGPM 3 (1901). */
export const STANDARD_GRAVITY = 9.80665;

/** Density of air at sea level in the ICAO standard atmosphere, kg/m³. ICAO Doc 7488/3, table A. */
export const STANDARD_AIR_DENSITY = 1.225;

/** Latitude, in degrees, beyond which the east and north of each grid node are turned into the point's own. */
export const POLAR_FRAME_LATITUDE = 85;

/** Advisory printed with every result; the caution follows IMO Resolution A.893(21) and 14 CFR 107.49(d) in spirit. */
export const ADVISORY =
  "Advisory estimate from forecast data and simplified models, for planning comparison only. Not for navigation. " +
  "No substitute for official charts, notices, forecasts and airspace information, the maker's limits, local " +
  "regulations, or the judgement of the licensed person in command.";

import type { FieldRole } from "../field/field.ts";

/**
 * How wrong a field may be: every component's error has this standard deviation, and the errors of one component at two places
 * d apart and two times Δt apart the correlation exp(-d/length) · exp(-|Δt|/time). Errors of the eastward and the northward
 * component, and of wind and current, are independent.
 */
export interface ForecastError {
  readonly role: FieldRole;
  /** Standard deviation of the eastward, and of the northward, component, m/s. */
  readonly speed_m_s: number;
  /** Correlation length, m along a great circle. */
  readonly length_m: number;
  /** Correlation time, s. */
  readonly time_s: number;
}

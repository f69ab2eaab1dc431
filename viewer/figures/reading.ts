/** How a reader wants figures read: across what, in which unit of temperature, beside what. Plain data. */

export const axisNames = ['time', 'phase', 'trueAnomaly', 'date', 'solarLongitude'] as const;
export type AxisName = (typeof axisNames)[number];

export interface Reading {
  /** Of the figures that run through the orbit; a figure that cannot follow keeps its own. */
  readonly axis: AxisName;
  readonly unit: 'K' | 'degC';
  /** The case from which differences are shown; null for the temperatures themselves. */
  readonly against: string | null;
}

export const plainReading: Reading = { axis: 'time', unit: 'K', against: null };

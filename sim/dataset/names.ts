/**
 * Variables that every model with a single temperature writes, on the dimension `time`. SI and radians.
 *
 * | name               | unit | what |
 * |--------------------|------|------|
 * | time               | s    | after periapsis for a periodic state (0 ≤ t < period); after the start for a forward run |
 * | weight             | 1    | share of the orbit's (forward: the run's) time that the row stands for; sums to 1 |
 * | meanAnomaly        | rad  | 0 … 2π |
 * | trueAnomaly        | rad  | 0 … 2π |
 * | distance           | m    | star to planet |
 * | instellation       | W/m2 | L/(4πr²) |
 * | absorbed           | W/m2 | f(1−A)S |
 * | emitted            | W/m2 | |
 * | temperature        | K    | |
 * | steadyTemperature  | K    | the instantaneous balance |
 */
export const timeSeriesVariables = [
  'time',
  'weight',
  'meanAnomaly',
  'trueAnomaly',
  'distance',
  'instellation',
  'absorbed',
  'emitted',
  'temperature',
  'steadyTemperature',
] as const;

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

/**
 * What models with latitude add. The variables above are then area means; `steadyTemperature` is the temperature that would
 * emit the area mean of absorbed and internal heat.
 *
 * | name               | dims           | unit | what |
 * |--------------------|----------------|------|------|
 * | solarLongitude     | time           | rad  | 0 is the northern spring equinox; 0 … 2π |
 * | latitude           | latitude       | rad  | middle of each equal-area band, south to north |
 * | latitudeBounds     | latitude, edge | rad  | its southern and northern edge |
 * | bandTemperature    | time, latitude | K    | |
 * | bandInsolation     | time, latitude | W/m2 | daily mean (or what `planet.insolation` says), mean over the band |
 * | bandAlbedo         | time, latitude | 1    | |
 * | bandEmitted        | time, latitude | W/m2 | |
 * | bandConvergence    | time, latitude | W/m2 | heat that transport brings; its area mean is zero |
 * | bandIceFraction    | time, latitude | 1    | |
 */
export const bandVariables = [
  'bandTemperature',
  'bandInsolation',
  'bandAlbedo',
  'bandEmitted',
  'bandConvergence',
  'bandIceFraction',
] as const;

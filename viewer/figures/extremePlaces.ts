/** Where and when a column is hottest and coldest of all latitudes and times. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import type { Kelvin, Seconds } from '../../sim/si.ts';
import { type Column, finding, findingValue } from '../words/columns.ts';
import { degreesOf, type LatitudeDeg } from '../words/latitude.ts';
import { fieldOf } from './bands.ts';
import { values } from './variables.ts';

export interface Place {
  readonly temperature: Kelvin;
  readonly latitudeDeg: LatitudeDeg;
  readonly time: Seconds;
}

/** The model's own finding, which lies between rows; without it the greatest or least value of the rows. */
export function extremePlace(column: Column, kind: 'hottest' | 'coldest'): Place {
  const temperature = findingValue(column, `${kind}Temperature`);
  const latitudeDeg = degreesOf(finding(column, `${kind}Latitude`));
  const time = findingValue(column, `${kind}Time`);
  if (temperature !== null && latitudeDeg !== null && time !== null) return { temperature, latitudeDeg, time };
  return ofRows(column, kind === 'hottest' ? 1 : -1);
}

function ofRows({ dataset }: Column, sign: 1 | -1): Place {
  const field = fieldOf(dataset, 'bandTemperature');
  let [bestRow, bestBand] = [0, 0];
  for (let row = 0; row < field.rows; row++) {
    for (let band = 0; band < field.bands; band++) {
      if (sign * (field.at(row, band) - field.at(bestRow, bestBand)) > 0) [bestRow, bestBand] = [row, band];
    }
  }
  return {
    temperature: field.at(bestRow, bestBand),
    latitudeDeg: values(dataset, 'latitude')[bestBand]! / radiansPerDegree,
    time: values(dataset, 'time')[bestRow]!,
  };
}

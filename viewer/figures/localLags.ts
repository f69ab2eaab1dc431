/** How late each latitude is hottest. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Seconds } from '../../sim/si.ts';
import { type Field, fieldOf } from './bands.ts';
import { highestPeak, peakTimes, type Rows, timeSince } from './rowPeaks.ts';
import { values } from './variables.ts';

/** Insolation that varies by less than this share of its maximum has no maximum worth the name. */
const leastVariation = 1e-3;

export interface LocalLag {
  readonly lag: Seconds;
  /** When the latitude is hottest, after periapsis. */
  readonly hottest: Seconds;
}

/**
 * Lag of each band's highest temperature behind the nearest preceding maximum of its own insolation, south to north; null
 * where the insolation hardly varies. Near the equator the star passes overhead twice an orbit: the later passage counts.
 */
export function localLags(dataset: Dataset, period: Seconds): (LocalLag | null)[] {
  const time = values(dataset, 'time');
  const insolation = fieldOf(dataset, 'bandInsolation');
  const temperature = fieldOf(dataset, 'bandTemperature');
  const rowsOf = (field: Field, band: number): Rows => ({ time, period, at: (row) => field.at(row, band) });
  return Array.from({ length: insolation.bands }, (_, band) => {
    const arriving = rowsOf(insolation, band);
    if (!variesEnough(arriving)) return null;
    const hottest = highestPeak(rowsOf(temperature, band));
    if (hottest === null) return null;
    const lag = timeSince(peakTimes(arriving), hottest, period);
    return lag === null ? null : { lag, hottest };
  });
}

function variesEnough({ time, at }: Rows): boolean {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (let row = 0; row < time.length; row++) {
    low = Math.min(low, at(row));
    high = Math.max(high, at(row));
  }
  return high - low > leastVariation * high;
}

/** Reading the chart of plain worlds backwards: an observed lag and an eccentricity give the heat-store number. */
import { SimError } from '../../error.ts';
import { rootBetween } from '../../solve/roots.ts';
import { largestEccentricity, plainResponder } from './plainResponse.ts';

export interface ObservedLag {
  readonly eccentricity: number;
  /** Of the maximum behind periapsis, as a share of the orbit. */
  readonly lag: number;
  /** Its uncertainty, ±. */
  readonly plusMinus: number;
}

export interface StoreReading {
  readonly storeNumber: number;
  /** What lag − ± and lag + ± give; null where that lag is out of reach, and sets no limit. */
  readonly low: number | null;
  readonly high: number | null;
}

/** None for the lag itself; limits from what its uncertainty takes in, null where it takes in none or sets none. */
export interface NoReading {
  readonly storeNumber: null;
  readonly reason: string;
  readonly low: number | null;
  readonly high: number | null;
}

export type ReadBack = StoreReading | NoReading;

/** ln of the heat-store numbers that are looked through: a lag is then told apart from none and from that of no emission at all. */
const searched = [Math.log(1e-4), Math.log(1e4)] as const;
const steps = 64;
const tolerance = 1e-12;

/**
 * A function with the solver's buffers. The lag grows with the heat store at every eccentricity that was tried; should it
 * ever not, several heat stores give the same lag, and the answer is null.
 * Errors: SimError unless 0 ≤ eccentricity ≤ 0.995, 0 ≤ plusMinus, and the lag is a number.
 */
export function lagReader(): (observed: ObservedLag) => ReadBack {
  const respond = plainResponder();
  return (observed) => {
    check(observed);
    const { eccentricity, lag, plusMinus } = observed;
    if (eccentricity === 0) {
      return { storeNumber: null, reason: 'a circular orbit has no lag to be read', low: null, high: null };
    }
    const response = (logNumber: number) => respond(eccentricity, Math.exp(logNumber), tolerance);
    const lags = places.map((at) => response(at).lag);
    const limit = (wanted: number): number | null => {
      const at = inverse(wanted, lags, (place) => response(place).lag);
      return typeof at === 'number' ? Math.exp(at) : null;
    };
    const found = inverse(lag, lags, (at) => response(at).lag);
    if (typeof found !== 'number') {
      const reason = lag <= 0 ? 'a heat store delays the maximum; this one is not late' : outOfReach[found](lags);
      const [low, high] = found === 'several' ? [null, null] : [limit(lag - plusMinus), limit(lag + plusMinus)];
      return { storeNumber: null, reason, low, high };
    }
    const error = plusMinus + response(found).lagError;
    return { storeNumber: Math.exp(found), low: limit(lag - error), high: limit(lag + error) };
  };
}

const places = Array.from({ length: steps + 1 }, (_, step) => {
  return searched[0] + ((searched[1] - searched[0]) * step) / steps;
});

type Missed = 'below' | 'above' | 'several';

const outOfReach: Readonly<Record<Missed, (lags: readonly number[]) => string>> = {
  below: () => 'so short a lag cannot be told from none',
  above: (lags) => {
    const most = (100 * Math.max(...lags)).toPrecision(3);
    return `at this eccentricity no heat store, however large, delays the maximum by more than ${most} % of the orbit`;
  },
  several: () => 'several heat stores give this lag',
};

/** The one place at which the lag is the wanted one. */
function inverse(wanted: number, lags: readonly number[], lagAt: (place: number) => number): number | Missed {
  const crossed = lags.slice(1).flatMap((lag, at) => (lags[at] < wanted !== lag < wanted ? [at] : []));
  if (crossed.length > 1) return 'several';
  if (crossed.length === 0) return wanted > lags[0] ? 'above' : 'below';
  const [at] = crossed;
  return rootBetween((place) => lagAt(place) - wanted, places[at], places[at + 1]);
}

function check({ eccentricity, lag, plusMinus }: ObservedLag): void {
  if (!(eccentricity >= 0 && eccentricity <= largestEccentricity)) {
    const mend = `Use 0 ≤ eccentricity ≤ ${largestEccentricity}`;
    throw new SimError('eccentricity', `${eccentricity} is not an orbit that can be read back`, mend);
  }
  if (!Number.isFinite(lag)) throw new SimError('lag', `${lag} is not a lag`, 'Give a share of the orbit');
  if (!(plusMinus >= 0 && Number.isFinite(plusMinus))) {
    throw new SimError('lag', `± ${plusMinus} is not an uncertainty`, 'Give zero or more');
  }
}

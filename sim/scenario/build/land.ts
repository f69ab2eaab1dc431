/** Land beside sea: its share of the area by latitude, its heat store, and what passes between the two. */
import type { Quantity } from '../../quantity/index.ts';
import type { Land } from '../../world.ts';
import type { Given } from './given.ts';
import type { GroundSetting } from './ground.ts';
import { buildHeatStore } from './heatStore.ts';

type Fraction = Land['fraction'];

/** `land` is null for a planet without; the whole is null where something is missing or wrong. */
export function buildLand(given: Given, ground: GroundSetting | null): { land: Land | null } | null {
  given.use('planet.landFraction');
  const written = given.keys.planet?.landFraction;
  if (!written) {
    if (given.has('planet.landFraction')) return null;
    warnUnused(given);
    return { land: null };
  }
  const fraction =
    'latitudes' in written
      ? given.once('planet.landFraction', () => readTable(given, written))
      : everywhere(written.value);
  if (!fraction) return null;
  const { value } = fraction;
  if (value.every((share) => share === 0)) return { land: null };
  const heatCapacity = buildHeatStore(given, ground, 'landHeatStore');
  const exchange = value.every((share) => share === 1) ? 0 : buildExchange(given);
  return heatCapacity === null || exchange === null ? null : { land: { fraction, heatCapacity, exchange } };
}

/** What is said of land means nothing where no land is. */
function warnUnused(given: Given): void {
  for (const key of ['landHeatStore', 'landSeaExchange']) {
    if (given.has(`planet.${key}`)) {
      given.warn(() => `planet.${key} is not used: planet.landFraction is not given.`);
    }
  }
}

/** No sea at any latitude. */
export function isAllLand({ fraction }: Land): boolean {
  return fraction.value.every((share) => share === 1);
}

function everywhere(share: number): Fraction {
  return { sineLatitude: [-1, 1], value: [share, share] };
}

function buildExchange(given: Given): number | null {
  const exchange = given.quantity('planet.landSeaExchange');
  if (exchange) return exchange.value;
  const mend = 'Write landSeaExchange, e.g. 1 W/m2/K; 0 W/m2/K keeps them apart';
  return given.missing('planet', ['landSeaExchange'], 'no exchange between land and sea is given', mend);
}

interface Table {
  readonly latitudes: readonly Quantity[];
  readonly values: readonly Quantity[];
}

const pole = Math.PI / 2;

function readTable(given: Given, { latitudes, values }: Table): Fraction | null {
  const key = 'planet.landFraction';
  if (latitudes.length !== values.length) {
    const what = `${count(latitudes.length, 'latitude')} and ${count(values.length, 'value')} stand in the table`;
    return given.wrong(key, what, 'Give each latitude its value');
  }
  const backward = latitudes.findIndex(({ value }, i) => i > 0 && !(value > latitudes[i - 1]!.value));
  if (backward > 0) {
    const what = `${latitudes[backward]!.text} stands after ${latitudes[backward - 1]!.text}`;
    return given.wrong(`${key}.latitudes`, what, 'Order the latitudes from south to north, each once');
  }
  const [south, north] = [latitudes[0], latitudes.at(-1)];
  if (!south || !north)
    return given.wrong(`${key}.latitudes`, 'the table is empty', 'Write at least [-90 deg, 90 deg]');
  if (Math.abs(south.value + pole) > 1e-9 || Math.abs(north.value - pole) > 1e-9) {
    const what = `the table runs from ${south.text} to ${north.text}`;
    return given.wrong(`${key}.latitudes`, what, 'Cover the globe: from -90 deg to 90 deg');
  }
  const fraction = {
    sineLatitude: latitudes.map((latitude) => Math.sin(latitude.value)),
    value: values.map(({ value }) => value),
  };
  given.derive('planet.meanLandFraction', mean(fraction), '1', 'Land fraction of the whole globe');
  return fraction;
}

function count(number: number, word: string): string {
  return `${number} ${word}${number === 1 ? '' : 's'}`;
}

/** Over the area: x = sin(latitude) runs from −1 to 1. */
function mean({ sineLatitude, value }: Fraction): number {
  return sineLatitude
    .slice(1)
    .reduce((sum, x, i) => sum + ((x - sineLatitude[i]!) * (value[i]! + value[i + 1]!)) / 4, 0);
}

/** Broken files of models with latitude, each with every message that it must give. */
import { expect, test } from 'vitest';
import { globe, soundGlobe } from './globes.ts';
import { complaints } from './sound.ts';

const land = '  landHeatStore: { mixedLayer: 2 m }';
const exchange = '  landSeaExchange: 1 W/m2/K';

const table: readonly (readonly [name: string, text: string, ...says: string[]])[] = [
  ['nothing wrong', soundGlobe],
  [
    'all that the model needs is missing',
    soundGlobe.slice(0, soundGlobe.indexOf('  heatTransport')),
    'p.yaml:4:1: planet: no heatTransport is given, which model zonal needs. Write heatTransport, e.g. 0.65 W/m2/K.',
    'p.yaml:4:1: planet: no obliquity is given, which model zonal needs. Write obliquity, e.g. 23 deg.',
    'p.yaml:4:1: planet: no solarLongitudeOfPeriapsis is given, which model zonal needs. Write solarLongitudeOfPeriapsis, e.g. 250 deg; 0 deg is the northern spring equinox.',
    'p.yaml:4:1: planet: no rotationPeriod is given, which model zonal needs. Write rotationPeriod, e.g. 26 h.',
  ],
  [
    'a model by the name of what every object has',
    soundGlobe.replace('zonal', 'constructor'),
    'p.yaml:1:8: model: no model `constructor` is built. Write `lumped` or `zonal`.',
  ],
  [
    'what is misspelt is not missing as well',
    globe({ obliquity: 'obliqity' }),
    'p.yaml:8:3: planet.obliqity: `obliqity` is not a key of planet. Did you mean `obliquity`?',
  ],
  [
    'one case alone lacks something',
    globe({ 'model: zonal': 'model: lumped', '  obliquity: 23 deg\n': '' }, 'cases: { a: {}, b: { model: zonal } }'),
    'p.yaml:4:1: planet: no obliquity is given, which model zonal needs (case `b`). Write obliquity, e.g. 23 deg.',
  ],
  [
    'obliquity beyond a half turn',
    globe({ '23 deg': '190 deg' }),
    'p.yaml:8:14: planet.obliquity: `190 deg` is out of bounds. Keep it at least 0 deg and at most 180 deg.',
  ],
  [
    'too few bands',
    globe({}, '  bands: 9'),
    'p.yaml:11:10: planet.bands: `9` is not a whole number from 18 to 720. Write e.g. 90.',
  ],
  [
    'half a band',
    globe({}, '  bands: 90.5'),
    'p.yaml:11:10: planet.bands: `90.5` is not a whole number from 18 to 720. Write e.g. 90.',
  ],
  [
    'heat that flows to the warm side',
    globe({ '0.65 W/m2/K': '-0.65 W/m2/K' }),
    'p.yaml:7:18: planet.heatTransport: `-0.65 W/m2/K` is out of bounds. Keep it at least 0 W/m2/K.',
  ],
  [
    'transport without its unit',
    globe({ '0.65 W/m2/K': '0.65' }),
    'p.yaml:7:18: planet.heatTransport: `0.65` has no unit. Write e.g. `0.65 W/m2/K`.',
  ],
  [
    'a ramp turned round',
    globe({ '258 K, to: 273 K': '273 K, to: 258 K' }),
    'p.yaml:5:41: planet.albedo.from: `from` 273 K is above `to` 258 K. All ice at `from` and below, none at `to` and above: swap them.',
  ],
  [
    'poles brighter than white',
    globe({ 'warm: 0.3': 'warm: 0.6', '273 K }': '273 K, p2: 0.5 }' }),
    'p.yaml:5:63: planet.albedo.p2: warm 0.6 and p2 0.5 give an albedo of 1.1 at the poles. Keep warm - p2/2 and warm + p2 at least 0 and below 1.',
  ],
  [
    'an equator darker than black',
    globe({ '273 K }': '273 K, p2: 0.61 }' }),
    'p.yaml:5:63: planet.albedo.p2: warm 0.3 and p2 0.61 give an albedo of -0.005 at the equator. Keep warm - p2/2 and warm + p2 at least 0 and below 1.',
  ],
  [
    'a frozen sea without a ramp',
    globe(
      { 'albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }': 'bondAlbedo: 0.3' },
      '  frozenHeatStore: { mixedLayer: 2 m }',
    ),
    'p.yaml:11:20: planet.frozenHeatStore: nothing says at which temperatures the sea is frozen. Write albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K } for bondAlbedo; the ramp serves both.',
  ],
  [
    'two stores in one',
    globe({}, '  frozenHeatStore: { mixedLayer: 2 m, heatCapacity: 1e7 J/m2/K }'),
    'p.yaml:11:20: planet.frozenHeatStore: heatCapacity and mixedLayer stand in one heat store. Keep one, or write a list that adds up: [{ heatCapacity: … }, { mixedLayer: … }].',
  ],
  [
    'a fraction above one',
    globe({}, '  landFraction: 1.2', land, exchange),
    'p.yaml:11:17: planet.landFraction: `1.2` is out of bounds. Keep it at least 0 and at most 1.',
  ],
  [
    'a fraction of a table below zero',
    globe({}, '  landFraction: { latitudes: [-90 deg, 90 deg], values: [-0.1, 0.5] }', land, exchange),
    'p.yaml:11:58: planet.landFraction.values.0: `-0.1` is out of bounds. Keep it at least 0 and at most 1.',
  ],
  [
    'a latitude beyond the pole',
    globe({}, '  landFraction: { latitudes: [-90 deg, 95 deg], values: [0.1, 0.5] }', land, exchange),
    'p.yaml:11:40: planet.landFraction.latitudes.1: `95 deg` is out of bounds. Keep it at least -90 deg and at most 90 deg.',
  ],
  [
    'a table that does not cover the globe',
    globe({}, '  landFraction: { latitudes: [-60 deg, 90 deg], values: [0.1, 0.5] }', land, exchange),
    'p.yaml:11:30: planet.landFraction.latitudes: the table runs from -60 deg to 90 deg. Cover the globe: from -90 deg to 90 deg.',
  ],
  [
    'a table in no order',
    globe(
      {},
      '  landFraction: { latitudes: [-90 deg, 30 deg, 20 deg, 90 deg], values: [0, 0.1, 0.5, 1] }',
      land,
      exchange,
    ),
    'p.yaml:11:30: planet.landFraction.latitudes: 20 deg stands after 30 deg. Order the latitudes from south to north, each once.',
  ],
  [
    'a latitude twice',
    globe({}, '  landFraction: { latitudes: [-90 deg, 0 deg, 0 deg, 90 deg], values: [0, 0, 1, 1] }', land, exchange),
    'p.yaml:11:30: planet.landFraction.latitudes: 0 deg stands after 0 deg. Order the latitudes from south to north, each once.',
  ],
  [
    'a table with a value too few',
    globe({}, '  landFraction: { latitudes: [-90 deg, 0 deg, 90 deg], values: [0.1, 0.5] }', land, exchange),
    'p.yaml:11:17: planet.landFraction: 3 latitudes and 2 values stand in the table. Give each latitude its value.',
  ],
  [
    'an empty table',
    globe({}, '  landFraction: { latitudes: [], values: [] }', land, exchange),
    'p.yaml:11:30: planet.landFraction.latitudes: the table is empty. Write at least [-90 deg, 90 deg].',
  ],
  [
    'a list for a table',
    globe({}, '  landFraction: [0.1, 0.5]', land, exchange),
    'p.yaml:11:17: planet.landFraction: a list stands here. Write e.g. 0.3.',
  ],
  [
    'land without a store and without exchange',
    globe({}, '  landFraction: 0.3'),
    'p.yaml:4:1: planet: no heat store of land is given. Write landHeatStore, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground.',
    'p.yaml:4:1: planet: no exchange between land and sea is given. Write landSeaExchange, e.g. 1 W/m2/K; 0 W/m2/K keeps them apart.',
  ],
  [
    'an insolation that nobody knows',
    globe({}, '  insolation: dayly'),
    'p.yaml:11:15: planet.insolation: `dayly` is not known here. Did you mean `daily`?',
  ],
  [
    'an insolation far from any word',
    globe({}, '  insolation: 340 W/m2'),
    'p.yaml:11:15: planet.insolation: `340 W/m2` is not understood. Write e.g. daily.',
  ],
  [
    'a series that does not start with one',
    globe({}, '  insolation: { legendre: [0.9, 0, -0.482] }'),
    'p.yaml:11:27: planet.insolation.legendre: the series starts with 0.9. P0 carries the global mean, so that its coefficient is 1: divide all of them by the first.',
  ],
  [
    'a series without end',
    globe({}, `  insolation: { legendre: [1${', 0'.repeat(13)}] }`),
    'p.yaml:11:27: planet.insolation.legendre: the series has 14 coefficients. Keep the first 13, P0 to P12.',
  ],
  [
    'a series of nothing',
    globe({}, '  insolation: { legendre: [] }'),
    'p.yaml:11:27: planet.insolation.legendre: the series is empty. Write e.g. [1, 0, -0.482].',
  ],
  [
    'a series that darkens below nothing',
    globe({}, '  insolation: { legendre: [1, 0, -1.2] }'),
    'p.yaml:11:27: planet.insolation.legendre: the series falls to -0.2 of the global mean at latitude -90 deg. No insolation is below zero: correct the coefficients.',
  ],
  [
    'a run from a start',
    globe({}, 'solve: { start: { temperature: 250 K, orbits: 20 } }'),
    'p.yaml:11:17: solve.start: model zonal finds periodic states and runs from no start. Write start: periodic, or model: lumped.',
  ],
  [
    'more values than a report can hold',
    globe({}, '  bands: 720', 'solve: { samples: 10000 }'),
    'p.yaml:12:19: solve.samples: 10000 samples of 720 bands make 7200000 values a field, more than 2000000. Lower samples or planet.bands.',
  ],
];

test.each(table)('%s', (_, text, ...says) => {
  expect(complaints(text)).toEqual(says);
});

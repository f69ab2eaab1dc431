import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { axisNames, plainReading } from '../../../../viewer/figures/reading.ts';
import {
  dropped,
  editsOf,
  fromHash,
  kept,
  type LiveState,
  moved,
  presentCases,
  readingFromHash,
  readingToHash,
  reset,
  toHash,
  unmoved,
} from '../../../../viewer/report/live/state.ts';

const names = ['rock', 'ocean & more', '100 % <b>ice</b>'];
const everything = () => true;

describe('moving', () => {
  test('the last value counts, and the way back leaves nothing', () => {
    const once = moved(unmoved, ['rock'], 'orbit.eccentricity', '0.1');
    const twice = moved(once, ['rock'], 'orbit.eccentricity', '0.2');
    expect(editsOf(twice, 'rock')).toEqual([{ key: 'orbit.eccentricity', text: '0.2' }]);
    expect(reset(twice, ['rock'], 'orbit.eccentricity')).toEqual(unmoved);
  });

  test('one case moves and the others stay', () => {
    const state = moved(unmoved, ['rock', 'ocean & more'], 'planet.bondAlbedo', '0.5');
    expect(presentCases(reset(state, ['rock']), names).map(({ edits }) => edits.length)).toEqual([0, 1, 0]);
  });

  test('a kept case stands beside the others under a free name, and its own goes back', () => {
    const state = moved(unmoved, ['rock'], 'planet.bondAlbedo', '0.5');
    const first = kept(state, 'rock', 'ocean & more', names);
    expect(first.changes).toEqual([]);
    expect(first.kept).toEqual([
      { name: 'ocean & more (2)', from: 'rock', edits: [{ key: 'planet.bondAlbedo', text: '0.5' }] },
    ]);
    expect(dropped(first, 'ocean & more (2)')).toEqual(unmoved);
  });
});

describe('a link', () => {
  test('brings any state back', () => {
    const change = fc.record({
      caseName: fc.constantFrom(...names),
      key: fc.constantFrom('orbit.eccentricity', 'planet.heatStore.0.mixedLayer'),
      text: fc.string({ unit: 'grapheme', minLength: 1 }),
    });
    const keptCase = fc.record({
      name: fc.string({ unit: 'grapheme', minLength: 1 }).filter((name) => !names.includes(name)),
      from: fc.constantFrom(...names),
      edits: fc
        .uniqueArray(change, { selector: ({ key }) => key })
        .map((all) => all.map(({ key, text }) => ({ key, text }))),
    });
    const state: fc.Arbitrary<LiveState> = fc.record({
      changes: fc.uniqueArray(change, { selector: ({ caseName, key }) => `${caseName} ${key}` }),
      kept: fc.uniqueArray(keptCase, { selector: ({ name }) => name }),
    });
    fc.assert(
      fc.property(state, (one) => {
        expect(fromHash(`#${toHash(one, names)}`, names, everything)).toEqual(one);
      }),
      { seed: 5, numRuns: 300 },
    );
  });

  test('brings back how figures are read, and leaves out what is plain', () => {
    for (const axis of axisNames) {
      for (const unit of ['K', 'degC'] as const) {
        for (const against of [null, ...names]) {
          const reading = { axis, unit, against };
          expect(readingFromHash(`#${readingToHash(reading)}`, names)).toEqual(reading);
        }
      }
    }
    expect(readingToHash(plainReading)).toBe('');
    expect(readingFromHash('#by=__proto__&in=F&from=nobody', names)).toEqual(plainReading);
  });

  test('what is not understood is left out', () => {
    const isKnown = (_: string, key: string) => key.startsWith('orbit.');
    const state = fromHash(
      '#0.orbit.eccentricity=0.2&7.orbit.eccentricity=1&0.__proto__=1&kept0=9.x&x=y&kept1=0.rock',
      names,
      isKnown,
    );
    expect(state).toEqual({ changes: [{ caseName: 'rock', key: 'orbit.eccentricity', text: '0.2' }], kept: [] });
  });
});

import { expect, test } from 'vitest';
import { derivedRows, inputLists, useNote } from '../../../viewer/words/inputRows.ts';
import { plainRun } from '../fixture.ts';

const { cases } = plainRun();
const names = cases.map(({ name }) => name);

test('inputLists: what differs apart from what is shared, nothing lost', () => {
  const { shared, different } = inputLists(cases);
  expect(different.map(({ key }) => key)).toEqual(['planet.heatStore.heatCapacity']);
  expect(shared.map(({ key }) => key)).toEqual([
    'star.luminosity',
    'orbit.eccentricity',
    'orbit.period',
    'planet.bondAlbedo',
    'planet.emissivity',
    'planet.obliquity',
  ]);
});

test('inputLists: the user’s own text, SI beside it, defaults marked', () => {
  const { shared } = inputLists(cases);
  const cell = (key: string) => shared.find((row) => row.key === key)!.cells[0]!;
  expect(cell('orbit.period')).toEqual({
    text: '120 d',
    si: '1.0368\u00a0×\u00a010⁷\u00a0s',
    isDefault: false,
    used: true,
  });
  expect(cell('planet.emissivity').isDefault).toBe(true);
});

test('inputLists: a date that was typed on another clock stands beside it in UTC', () => {
  const [first] = cases;
  // 2000-01-02T12:00 TDB is 64.18 s ahead of UTC: 32.184 s and 32 leap seconds.
  const date = { ...first!.inputs[0]!, key: 'orbit.transitTime', text: '2451546 TDB', value: 86_400, unit: 's' };
  const { shared } = inputLists([{ ...first!, inputs: [{ ...date, since: 'J2000.0 TDB' }] }]);
  expect(shared[0]!.cells[0]!.si).toBe('2000-01-02 11:58 UTC');
});

test('inputLists: an input that only one case has differs', () => {
  const [first, ...others] = cases;
  const extra = { ...first!.inputs[0]!, key: 'planet.heatStore.mixedLayer', text: '20 m' };
  const { different } = inputLists([{ ...first!, inputs: [...first!.inputs, extra] }, ...others]);
  expect(different.find(({ key }) => key === extra.key)!.cells.map((cell) => cell?.text ?? null)).toEqual([
    '20 m',
    null,
    null,
  ]);
});

test('useNote: says which cases use an input', () => {
  const row = (key: string) => inputLists(cases).shared.find((candidate) => candidate.key === key)!;
  expect(useNote(row('orbit.period'), names)).toBeNull();
  expect(useNote(row('planet.obliquity'), names)).toBe('not used');
  const [one] = row('orbit.period').cells;
  expect(useNote({ ...row('orbit.period'), cells: [{ ...one!, used: false }, one!, one!] }, names)).toBe(
    'used only by “shallow sea” and “thick air”',
  );
});

test('derivedRows: the time of periapsis is a date, on the clock that readers use', () => {
  // 2026-03-04T05:00:00 UTC is 825 872 469.184 TDB seconds after J2000: TT − UTC = 69.184 s (37 leap seconds), TDB − TT < 2 ms.
  const [row] = derivedRows(plainRun({ periapsisTime: 825_872_469.185 }).cases);
  expect(row).toEqual({ key: 'orbit.periapsisTime', label: 'Periapsis', cells: ['2026-03-04 05:00 UTC'] });
});

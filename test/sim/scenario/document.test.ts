/** The reader of syntax: places, aliases, and texts that would exhaust a reader. */
import { describe, expect, test } from 'vitest';
import { readDocument } from '../../../sim/scenario/document.ts';
import { placeOf, plain, subtree } from '../../../sim/scenario/tree.ts';

const read = (text: string) => readDocument(text, 'p.yaml');

describe('places', () => {
  const root = read('star: { mass: 1 Msun,\n  radius:   2 Rsun }\nlist:\n  - a: 1\n  - b\n').root!;

  test('of a value, of its key, and of the last key on the way to nothing', () => {
    expect(placeOf(root, ['star', 'radius'])).toEqual({ at: { line: 2, column: 13 }, path: ['star', 'radius'] });
    expect(placeOf(root, ['star', 'radius'], true).at).toEqual({ line: 2, column: 3 });
    expect(placeOf(root, ['star', 'none', 'deeper'])).toEqual({
      at: { line: 1, column: 1 },
      path: ['star', 'none', 'deeper'],
    });
    expect(placeOf(root, ['list', '1']).at).toEqual({ line: 5, column: 5 });
    expect(placeOf(root, ['list', '0', 'a']).at).toEqual({ line: 4, column: 8 });
  });

  test('Windows line ends, a byte order mark and letters beyond ASCII do not shift them', () => {
    const found = read('\ufefftitle: Zoë 雪\r\nstar:\r\n  mass: 1 Msun\r\n').root!;
    expect(placeOf(found, ['star', 'mass']).at).toEqual({ line: 3, column: 9 });
  });
});

test('YAML 1.2, not 1.1: these words stay words, these numbers decimal', () => {
  const { root } = read('a: no\nb: 3:2\nc: 1_000\nd: 017\ne: 2026-03-04\nf: 0x1F\ng: 1e-6\nh: off\n');
  expect(JSON.parse(JSON.stringify(plain(root!)))).toEqual({
    ...{ a: 'no', b: '3:2', c: '1_000', d: '17', e: '2026-03-04', f: '31', g: '1e-6', h: 'off' },
  });
});

test('an alias stands for what its anchor holds, with the place of that value', () => {
  const { root, problems } = read('a: &x { b: 1 }\nc: *x\n');
  expect(problems).toEqual([]);
  expect(placeOf(root!, ['c', 'b']).at).toEqual({ line: 1, column: 12 });
});

describe('texts that would exhaust a reader are refused at once', () => {
  const bomb = [...'bcdefghi'].map((name, i) => `${name}: &${name} [${Array(9).fill(`*${'abcdefgh'[i]}`).join(', ')}]`);
  test.each([
    ['brackets', '['.repeat(20_000)],
    ['braces', '{a: '.repeat(20_000)],
    ['dashes', '- '.repeat(20_000)],
    ['question marks', '? '.repeat(20_000)],
    ['indentation', Array.from({ length: 1000 }, (_, i) => `${' '.repeat(i)}a:`).join('\n')],
    ['an alias bomb', `a: &a [x, x]\n${bomb.join('\n')}\n`],
    ['an alias of itself', 'a: &a [*a]'],
    ['a megabyte of text', `notes: ${'x'.repeat(1_000_001)}`],
  ])('%s', (_, text) => {
    const { root, problems } = read(text);
    expect(root).toBeNull();
    expect(problems).toHaveLength(1);
    expect(problems[0]!.what).toMatch(/nested too deeply|characters/);
  });
});

test('keys that mean something to JavaScript are keys like others', () => {
  const { root } = read('__proto__: { mass: 1 }\nconstructor: 2\ntoString: 3\n');
  expect(Object.keys(plain(root!) as object)).toEqual(['__proto__', 'constructor', 'toString']);
  expect(subtree(root!, ['__proto__', 'mass'])).toMatchObject({ value: 1 });
});

/** Seeded damage to scenario texts, of the kinds that people and editors do. */
import { richGlobe } from './globes.ts';
import { sound } from './sound.ts';

/** Many keys of the contract in few lines, so that most damage hits something. */
export const rich = `title: Corvane b under three ground assumptions
notes: free text
model: lumped
star:
  temperature: 5100 ± 40 K
  radius: 0.924 Rsun
  mass: 0.85 Msun
orbit:
  semiMajorAxis: 0.48 au
  eccentricity: 0.62 +0.03 -0.05
  argumentOfPeriapsis: 105 deg
  inclination: isotropic
  transitTime: 2461103.71 TDB
planet:
  radius: 2.1 Rearth
  mass: 4 Mearth
  albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K, p2: 0 }
  emission: { linear: { a: 203.3 W/m2, b: 2.09 W/m2/K } }
  absorbingFraction: 0.25
  internalHeat: < 0.12 W/m2 (95%)
  heatStore: [{ mixedLayer: 20 m }, { heatCapacity: 1e5 to 1e9 J/m2/K log }]
  rotationPeriod: 26 h
  obliquity: 23 deg
  solarLongitudeOfPeriapsis: 250 deg
cases:
  shallow sea: {}
  bare rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }
  thick air: { planet: { emission: null, heatStore: { atmosphere: { surfacePressure: 5 bar, specificHeat: 1004 J/kg/K } } } }
  pushed: { orbit: { period: 120 d }, solve: { start: { temperature: 250 K, orbits: 20, at: 0 deg } } }
windows:
  liquid water at 1 bar: 273.15 K to 373.15 K
  temperate: { habitable: [runawayGreenhouse, maximumGreenhouse] }
solve:
  tolerance: 1e-6
  start: periodic
  samples: 720
  spacing: time
`;

const scraps = [
  ...[
    '0',
    '-1',
    '1e300',
    '-1e-300',
    '1e400',
    '.nan',
    '.inf',
    '0x1F',
    '017',
    '1_000',
    'null',
    '~',
    'true',
    'no',
    "''",
    '""',
  ],
  ...[
    'au',
    'K',
    'degC',
    '%',
    'd',
    'Lsun',
    'W/m2',
    'isotropic',
    '± 0',
    '± 1e300',
    '+1 -1',
    ' to ',
    ' log',
    '< ',
    '(95%)',
  ],
  ...[
    '{}',
    '[]',
    '{',
    '}',
    '[',
    ']',
    ': ',
    ':',
    '- ',
    '? ',
    '#',
    '|',
    '>',
    '&a ',
    '*a',
    '!!str ',
    '%',
    '@',
    '`',
    '"',
    "'",
  ],
  ...[
    '\t',
    '\n',
    '\r\n',
    '\u0000',
    '\u001b[31m',
    '\u202e',
    '\ud800',
    '😀',
    '\ufeff',
    '---\n',
    '...\n',
    '%YAML 1.1\n',
    '<<: ',
  ],
  ...['__proto__', 'constructor', 'toString', 'cases', 'star', 'orbit', 'planet', 'windows', 'solve', 'x'.repeat(300)],
  ...[
    'eccentricity: 0.99999',
    'period: 1e-300 s',
    'period: 1e300 yr',
    'instellation: 1e-300 S0',
    'luminosity: 1e280 Lsun',
  ],
  ...[
    'sqrtECosOmega: 0.3',
    'albedo: 0.3',
    'bondAlbedo: 1',
    'heatStore: []',
    'epoch: 0 TDB',
    'rotationPeriod: 3:2',
    'density: 1 g/cm3',
  ],
] as const;

/** Uniform numbers in [0, 1): a 32-bit generator (Numerical Recipes, ranqd1), good enough to choose damage. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** A text with one to four damages. */
export function mutated(random: () => number): string {
  const pick = <T>(items: readonly T[]): T => items[Math.floor(random() * items.length)]!;
  let text = pick([sound, rich, richGlobe]);
  // Often one or two, seldom many: what is half wrong finds more faults than what is all wrong.
  const times = 1 + Math.floor(random() ** 3 * 5);
  for (let i = 0; i < times; i++) text = (random() < 0.35 ? nudgeNumber : pick(damages))(text, random, pick);
  return text;
}

type Damage = (text: string, random: () => number, pick: <T>(items: readonly T[]) => T) => string;

const at = (text: string, random: () => number) => Math.floor(random() * (text.length + 1));

const damages: readonly Damage[] = [
  (text, random, pick) => splice(text, at(text, random), 0, pick(scraps)),
  (text, random) => splice(text, at(text, random), 1 + Math.floor(random() * 4), ''),
  (text, random) => splice(text, at(text, random), 1, String.fromCharCode(32 + Math.floor(random() * 95))),
  (text, random) => text.slice(0, at(text, random)),
  (text, _random, pick) => withLines(text, (lines) => lines.filter((line) => line !== pick(lines))),
  (text, _random, pick) => withLines(text, (lines) => [...lines, pick(lines)]),
  (text, random) => withLines(text, (lines) => lines.toSorted(() => random() - 0.5).slice(0, lines.length)),
  (text, _random, pick) => swapValues(text, pick),
  (text, _random, pick) => replaceValue(text, pick(scraps), pick),
  (text, _random, pick) => replaceNumber(text, pick(scraps.slice(0, 14)), pick),
  (text, random, pick) =>
    withLines(text, (lines) => lines.toSpliced(Math.floor(random() * lines.length), 0, `  ${pick(scraps)}`)),
  (text, random, pick) => {
    const victim = pick(text.split('\n'));
    return text.replace(victim, `${' '.repeat(Math.floor(random() * 6))}${victim.trimStart()}`);
  },
];

function splice(text: string, index: number, remove: number, insert: string): string {
  return text.slice(0, index) + insert + text.slice(index + remove);
}

function withLines(text: string, change: (lines: string[]) => string[]): string {
  return change(text.split('\n')).join('\n');
}

const values = (text: string) => [...text.matchAll(/: ([^\n{}[\],]+)/g)].map((match) => match[1]!);

function swapValues(text: string, pick: <T>(items: readonly T[]) => T): string {
  const all = values(text);
  return all.length ? text.replace(`: ${pick(all)}`, () => `: ${pick(all)}`) : text;
}

function replaceValue(text: string, scrap: string, pick: <T>(items: readonly T[]) => T): string {
  const all = values(text);
  return all.length ? text.replace(`: ${pick(all)}`, () => `: ${scrap}`) : text;
}

/** A number some powers of ten away: it may stay in bounds, and often the whole still fits together. */
const nudgeNumber: Damage = (text, random, pick) => {
  const nudged = (number: string) =>
    String(Number((Number(number) * 10 ** (6 * (random() - 0.5) ** 3)).toPrecision(4)));
  const numbers = [...text.matchAll(/\d+(?:\.\d+)?/g)].map((match) => match[0]);
  const victim = numbers.length ? pick(numbers) : '';
  return text.replace(victim, () => nudged(victim));
};

function replaceNumber(text: string, scrap: string, pick: <T>(items: readonly T[]) => T): string {
  const numbers = [...text.matchAll(/\d+(?:\.\d+)?/g)].map((match) => match[0]);
  return numbers.length ? text.replace(pick(numbers), () => scrap) : text;
}

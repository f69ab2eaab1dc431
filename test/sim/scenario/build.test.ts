/** From keys to a World: every way to say a thing, what must agree, what follows, what is warned about. */
import { describe, expect, test } from 'vitest';
import {
  earthMass,
  earthRadius,
  gravitationalConstant,
  metresPerAu,
  radiansPerDegree,
  secondsPerDay,
  solarIrradiance,
  solarLuminosity,
  solarMass,
  solarRadius,
  stefanBoltzmann,
} from '../../../sim/constants.ts';
import type { ScenarioCase } from '../../../sim/scenario/types.ts';
import { edited, onlyCase, sound } from './sound.ts';

/** Equal but for rounding in a handful of operations. */
const rounding = 1e-14;

function expectNear(value: number | null | undefined, expected: number, relative = rounding): void {
  expect(value).toBeTypeOf('number');
  expect(Math.abs(value! / expected - 1)).toBeLessThanOrEqual(relative);
}

const derived = ({ derived: all }: ScenarioCase, key: string) => all.find((one) => one.key === key)?.value;
const withPlanet = (line: string) => onlyCase(edited(['  bondAlbedo: 0.3', `  ${line}`]));
const withStore = (store: string, ...edits: [string, string][]) =>
  onlyCase(edited(['{ mixedLayer: 20 m }', store], ...edits));
const withOrbit = (lines: string) => onlyCase(edited(['  semiMajorAxis: 0.48 au', lines]));

const isUsed = ({ inputs }: ScenarioCase, key: string) => inputs.find((one) => one.key === key)?.used;

describe('star', () => {
  test('luminosity as given, in SI', () => {
    expectNear(onlyCase(sound).world.star.luminosity, 0.52 * solarLuminosity);
  });

  test('temperature and radius give the luminosity, 4πR²σT⁴', () => {
    const { world } = onlyCase(edited(['luminosity: 0.52 Lsun', 'temperature: 5100 K\n  radius: 0.924 Rsun']));
    expectNear(world.star.luminosity, 4 * Math.PI * (0.924 * solarRadius) ** 2 * stefanBoltzmann * 5100 ** 4);
    expect(world.star.temperature).toBe(5100);
  });

  test('luminosity and radius give the temperature', () => {
    const { world } = onlyCase(edited(['  mass', '  radius: 0.924 Rsun\n  mass']));
    // The definition of the effective temperature, turned round.
    expectNear(
      4 * Math.PI * world.star.radius! ** 2 * stefanBoltzmann * world.star.temperature! ** 4,
      world.star.luminosity,
    );
  });

  test('all three may stand together within 1 %: the luminosity counts, and the difference is told', () => {
    // 0.924² (5100/5772)⁴ = 0.5204 of the Sun's.
    const found = onlyCase(edited(['  mass', '  temperature: 5100 K\n  radius: 0.924 Rsun\n  mass']));
    expectNear(found.world.star.luminosity, 0.52 * solarLuminosity);
    // Too little to warn of: only check tells it.
    expect(found.warnings).toEqual([]);
    expect(found.remarks).toEqual([
      'Luminosity: luminosity 0.52 Lsun is used; 0.52038 Lsun (from temperature 5100 K and radius 0.924 Rsun) is 0.073 % off.',
    ]);
    expect(isUsed(found, 'star.luminosity')).toBe(true);
    expect(isUsed(found, 'star.temperature') || isUsed(found, 'star.radius')).toBe(false);
    // 0.928² (5100/5772)⁴ = 0.5249: 0.94 % off, without an uncertainty that would excuse it.
    const farther = (radius: string) =>
      onlyCase(edited(['  mass', `  temperature: 5100 K\n  radius: ${radius}\n  mass`]));
    expect(farther('0.928 Rsun').warnings).toEqual([expect.stringContaining('0.94 % off')]);
    expect(farther('0.928 ± 0.01 Rsun')).toMatchObject({
      warnings: [],
      remarks: [expect.stringContaining('0.94 % off')],
    });
  });

  test('what is passed over as redundant counts as used where something else hangs on it', () => {
    const both = edited(['  mass', '  temperature: 5100 K\n  radius: 0.924 Rsun\n  mass']);
    const hz = onlyCase(`${both}windows: { hz: { habitable: [runawayGreenhouse, maximumGreenhouse] } }\n`);
    expect([isUsed(hz, 'star.temperature'), isUsed(hz, 'star.radius')]).toEqual([true, false]);
    const dense = onlyCase(both.replace('mass: 0.85 Msun', 'density: 1.52 g/cm3'));
    expect([isUsed(dense, 'star.temperature'), isUsed(dense, 'star.radius')]).toEqual([false, true]);
    const timed = onlyCase(edited(['0.48 au', '0.48 au\n  period: 131.75 d']));
    expect([isUsed(timed, 'orbit.period'), isUsed(timed, 'orbit.semiMajorAxis')]).toEqual([true, false]);
  });

  test('a temperature that no star has, an orbit that no star holds, ice that darkens: a warning each', () => {
    const warnings = (...edits: [string, string][]) => onlyCase(edited(...edits)).warnings;
    expect(warnings(['  mass', '  temperature: 1900 K\n  mass'])[0]).toMatch(/^A star of 1900 K would be unusual/);
    expect(warnings(['  mass', '  temperature: 2566 K\n  mass'])).toEqual([]);
    expect(warnings(['0.48 au', '4.8e5 au'])[0]).toMatch(/^A semi-major axis of 480000 au is wider/);
    expect(warnings(['bondAlbedo: 0.3', 'albedo: { warm: 0.3, ice: 0.2, from: 258 K, to: 273 K }'])).toEqual([
      'The albedo of ice, 0.2, is below the warm one, 0.3: freezing would darken this planet.',
    ]);
  });

  test('a spread larger than a value that cannot be negative: a warning', () => {
    const warnings = (text: string) => onlyCase(edited(['eccentricity: 0.62', text])).warnings;
    expect(warnings('eccentricity: 0.02 ± 0.03')[0]).toMatch(
      /^orbit\.eccentricity 0\.02 ± 0\.03: the spread is larger/,
    );
    expect(warnings('eccentricity: 0.02 +0.05 -0.01')).toEqual([]);
    expect(warnings('eCosOmega: 0.02 ± 0.03\n  eSinOmega: 0.1')).toEqual([]);
    expect(warnings('eccentricity: 0.1\n  argumentOfPeriapsis: 5 ± 10 deg')).toEqual([]);
  });

  test('beyond 1 % they may stand together within three times their stated uncertainty', () => {
    // The radius is 4 % too large, so the luminosity 8 %; 3σ of ± 3 % in the radius allows 18 %.
    const text = (radius: string) => edited(['  mass', `  temperature: 5100 K\n  radius: ${radius}\n  mass`]);
    expect(() => onlyCase(text('0.961 Rsun'))).toThrow(/differ by 8/);
    expect(onlyCase(text('0.961 ± 0.03 Rsun')).warnings[0]).toContain('8.2 % off');
  });

  test('density and radius give the mass, 4/3 π ρ R³', () => {
    const { world } = onlyCase(edited(['mass: 0.85 Msun', 'radius: 0.9 Rsun\n  density: 1.5 g/cm3']));
    expectNear(world.star.mass, (4 / 3) * Math.PI * 1500 * (0.9 * solarRadius) ** 3);
  });
});

describe('size of the orbit', () => {
  test("Kepler's third law takes star and planet together", () => {
    // Own calculation with nominal constants: a massless body at 1 au has 31 558 196.020 s; printed to 3e-11.
    const alone = onlyCase(edited(['0.85 Msun', '1 Msun'], ['0.48 au', '1 au']));
    expectNear(alone.world.orbit.period, 31_558_196.02, 5e-11);
    const heavy = onlyCase(
      edited(['0.85 Msun', '1 Msun'], ['0.48 au', '1 au'], ['  bondAlbedo', '  mass: 0.1 Msun\n  bondAlbedo']),
    );
    expectNear(heavy.world.orbit.period, alone.world.orbit.period / Math.sqrt(1.1));
  });

  test('axis, period, a/R* and instellation at distance a: each gives the same orbit', () => {
    const { orbit, star } = onlyCase(sound).world;
    const flux = star.luminosity / (4 * Math.PI * orbit.semiMajorAxis ** 2) / solarIrradiance;
    const ways = [
      withOrbit(`  period: ${orbit.period / secondsPerDay} d`),
      withOrbit(`  instellation: ${flux} S0`),
      onlyCase(
        edited(
          ['  mass', '  radius: 0.9 Rsun\n  mass'],
          ['semiMajorAxis: 0.48 au', `scaledSemiMajorAxis: ${orbit.semiMajorAxis / (0.9 * solarRadius)}`],
        ),
      ),
    ];
    for (const { world } of ways) {
      expectNear(world.orbit.semiMajorAxis, orbit.semiMajorAxis);
      expectNear(world.orbit.period, orbit.period);
    }
  });

  test('axis and period suffice without a mass, and imply one', () => {
    const found = onlyCase(
      edited(['  mass: 0.85 Msun\n', ''], ['  eccentricity', '  period: 131.748 d\n  eccentricity']),
    );
    const { semiMajorAxis, period } = found.world.orbit;
    expect([semiMajorAxis, period]).toEqual([0.48 * metresPerAu, 131.748 * secondsPerDay]);
    expectNear(
      derived(found, 'star.mass'),
      (4 * Math.PI ** 2 * semiMajorAxis ** 3) / (gravitationalConstant * period ** 2),
    );
  });

  test('axis, period and mass within 1 %: period and mass win, and the difference is told', () => {
    const found = onlyCase(edited(['  eccentricity', '  period: 131 d\n  eccentricity']));
    const { semiMajorAxis, period } = found.world.orbit;
    expect(period).toBe(131 * secondsPerDay);
    expectNear(semiMajorAxis ** 3, (gravitationalConstant * 0.85 * solarMass * period ** 2) / (4 * Math.PI ** 2));
    expect(found.warnings).toEqual([
      'Semi-major axis: 0.47818 au (from period 131 d and star mass 0.85 Msun) is used; semiMajorAxis 0.48 au is 0.38 % off.',
    ]);
  });

  test('beyond 1 %, three times the stated uncertainties decide', () => {
    const text = (period: string) => edited(['  eccentricity', `  period: ${period}\n  eccentricity`]);
    expect(() => onlyCase(text('125 d'))).toThrow(/differ by 3.6 %; at most 1 % is allowed/);
    expect(onlyCase(text('125 ± 3 d')).warnings[0]).toContain('3.6 % off');
  });
});

describe('shape of the orbit', () => {
  const e = 0.4;
  const omega = 250 * radiansPerDegree;

  test.each([
    [`eccentricity: ${e}\n  argumentOfPeriapsis: 250 deg`],
    [`eCosOmega: ${e * Math.cos(omega)}\n  eSinOmega: ${e * Math.sin(omega)}`],
    [`sqrtECosOmega: ${Math.sqrt(e) * Math.cos(omega)}\n  sqrtESinOmega: ${Math.sqrt(e) * Math.sin(omega)}`],
  ])('%s', (keys) => {
    const { orbit } = onlyCase(edited(['eccentricity: 0.62', keys])).world;
    expectNear(orbit.eccentricity, e);
    expectNear(orbit.argumentOfPeriapsis, omega);
  });

  test('up to 0.9999, and no further', () => {
    expect(onlyCase(edited(['0.62', '0.9999'])).world.orbit.eccentricity).toBe(0.9999);
    expect(() => onlyCase(edited(['0.62', '0.99991']))).toThrow(/accurate up to 0.9999/);
  });
});

describe('when periapsis is', () => {
  const time = (keys: string) =>
    onlyCase(edited(['eccentricity: 0.62', `eccentricity: 0.62\n  ${keys}`])).world.orbit.periapsisTime!;
  const period = onlyCase(sound).world.orbit.period;

  test('a Julian date in TDB is what it says', () => {
    expect(time('periapsisTime: 2451546.5 TDB')).toBe(1.5 * secondsPerDay);
  });

  test('an epoch and its mean anomaly: the periapsis next to it', () => {
    const epoch = time('periapsisTime: 2461103.71 TDB');
    // A third of the orbit after periapsis; 1e-4 s of a double that holds 8e8 s.
    expect(time('epoch: 2461103.71 TDB\n  meanAnomaly: 120 deg')).toBeCloseTo(epoch - period / 3, 4);
    expect(time('epoch: 2461103.71 TDB\n  meanAnomaly: 330 deg')).toBeCloseTo(epoch + period / 12, 4);
  });

  test('a transit at ω = 90° is a periapsis; at ω = 270° it is half an orbit away', () => {
    const transit = time('periapsisTime: 2461103.71 TDB');
    expect(time('transitTime: 2461103.71 TDB\n  argumentOfPeriapsis: 90 deg')).toBeCloseTo(transit, 4);
    const opposite = time('transitTime: 2461103.71 TDB\n  argumentOfPeriapsis: 270 deg');
    expect(Math.abs(opposite - transit)).toBeCloseTo(period / 2, 4);
  });

  test('on a circle a transit needs no ω', () => {
    const text = edited(['eccentricity: 0.62', 'eccentricity: 0\n  transitTime: 2461103.71 TDB']);
    expect(onlyCase(text).world.orbit.periapsisTime).toBeCloseTo(time('periapsisTime: 2461103.71 TDB'), 4);
  });

  test('no date, no periapsis time', () => {
    expect(onlyCase(sound).world.orbit.periapsisTime).toBeNull();
  });
});

describe('heat stores', () => {
  const capacity = (store: string) => withStore(store).world.surface.heatCapacity;

  test('each form by its equation', () => {
    expectNear(capacity('{ heatCapacity: 4e7 J/m2/K }'), 4e7);
    expectNear(capacity('{ mixedLayer: 20 m }'), 1025 * 3990 * 20); // sea water, rounded
    expectNear(
      capacity('{ atmosphere: { surfacePressure: 5 bar, specificHeat: 1004 J/kg/K, gravity: 11 m/s2 } }'),
      (5e5 * 1004) / 11,
    );
    const { period } = onlyCase(sound).world.orbit;
    expectNear(
      capacity('{ ground: { thermalInertia: 2200 tiu, cycle: orbit } }'),
      2200 * Math.sqrt(period / (4 * Math.PI)),
    );
    expectNear(
      capacity('{ ground: { thermalInertia: 2200 tiu, cycle: 26 h } }'),
      2200 * Math.sqrt((26 * 3600) / (4 * Math.PI)),
    );
  });

  test('a list adds up', () => {
    expectNear(
      capacity('[{ heatCapacity: 4e7 J/m2/K }, { heatCapacity: 1e7 J/m2/K }, { mixedLayer: 1 m }]'),
      5e7 + 1025 * 3990,
    );
  });

  test('gravity comes from mass and radius where it is left out, and a differing one is told', () => {
    const air = (gravity: string) =>
      `{ atmosphere: { surfacePressure: 1 bar, specificHeat: 1004 J/kg/K${gravity} } }\n  mass: 4 Mearth\n  radius: 1.6 Rearth`;
    const gravity = (gravitationalConstant * 4 * earthMass) / (1.6 * earthRadius) ** 2;
    expectNear(withStore(air('')).world.surface.heatCapacity, (1e5 * 1004) / gravity);
    expect(withStore(air(', gravity: 9.81 m/s2')).warnings).toEqual([
      'planet.heatStore.atmosphere.gravity 9.81 m/s2 is used; mass and radius of the planet give 15.3 m/s2.',
    ]);
  });

  test.each([
    ['26 h', 26 * 3600],
    ["'3:2'", null],
    ['synchronous', null],
    ['pseudoSynchronous', null],
  ])('ground warmed by the rotation: %s', (rotation, seconds) => {
    const found = withStore(`{ ground: { thermalInertia: 100 tiu, cycle: rotation } }\n  rotationPeriod: ${rotation}`);
    const { period, eccentricity } = found.world.orbit;
    const e2 = eccentricity ** 2;
    // Hut (1981) A&A 99, 126, eq. 42, from memory of the paper: rotation over mean motion.
    const hut =
      (1 + 7.5 * e2 + (45 / 8) * e2 ** 2 + (5 / 16) * e2 ** 3) / ((1 + 3 * e2 + (3 / 8) * e2 ** 2) * (1 - e2) ** 1.5);
    const expected =
      { "'3:2'": (2 / 3) * period, synchronous: period, pseudoSynchronous: period / hut }[rotation] ?? seconds!;
    expectNear(found.world.surface.heatCapacity, 100 * Math.sqrt(expected / (4 * Math.PI)));
    // Only a fast rotator's solar day is near its rotation period.
    expect(found.warnings.some((warning) => warning.includes('solar day'))).toBe(rotation !== '26 h');
  });

  test('lumped ground that answers otherwise than a half-space says by how much', () => {
    // Slow ground: Γ√ω far above the radiative slope, where the half-space lags 45° and the lumped store 90°.
    const slow = withStore('{ ground: { thermalInertia: 2e6 tiu, cycle: orbit } }');
    expect(slow.warnings[0]).toMatch(/^Ground as one lumped store: .* more than 20 % apart\.$/);
    const eighth = slow.world.orbit.period / 8;
    expect(derived(slow, 'planet.heatStore.ground.halfSpaceLag')! / eighth).toBeCloseTo(1, 1);
    expect(derived(slow, 'planet.heatStore.ground.lumpedLag')! / eighth).toBeCloseTo(2, 1);
    // Fast ground: both follow at once.
    expect(withStore('{ ground: { thermalInertia: 5 tiu, cycle: orbit } }').warnings).toEqual([]);
  });
});

describe('surface', () => {
  test('bond albedo, ramp, step', () => {
    expect(onlyCase(sound).world.surface.albedo).toMatchObject({ warm: 0.3, ice: 0.3, ramp: null });
    const ramp = withPlanet('albedo: { warm: 0.3, ice: 0.62, from: -15 degC, to: 273.15 K }').world.surface.albedo;
    expect(ramp).toMatchObject({ warm: 0.3, ice: 0.62, ramp: { from: 258.15, to: 273.15 } });
    expect(ramp.at(265.65)).toBeCloseTo(0.46, 12); // the middle of the smoothstep
    expect(withPlanet('albedo: { warm: 0.3, ice: 0.62, from: 265 K, to: 265 K }').world.surface.albedo.at(264.9)).toBe(
      0.62,
    );
  });

  test('emission: a grey body unless another law is given', () => {
    const slopeless = (line: string) => withPlanet(`bondAlbedo: 0.3\n  ${line}`).world.surface.emission.at(273.15);
    const black = stefanBoltzmann * 273.15 ** 4;
    expectNear(onlyCase(sound).world.surface.emission.at(273.15), black);
    expectNear(slopeless('emissivity: 0.9'), 0.9 * black);
    expectNear(slopeless('emission: { opticalDepth: 0.83 }'), black / (1 + 0.75 * 0.83));
    expectNear(slopeless('emission: { linear: { a: 203.3 W/m2, b: 2.09 W/m2/K } }'), 203.3);
  });

  test('defaults: emissivity 1, absorbing fraction 1/4, no internal heat', () => {
    const { surface } = onlyCase(sound).world;
    expect(surface).toMatchObject({ absorbingFraction: 0.25, internalHeat: 0 });
    expect(surface.emission.quarticCoefficient).toBe(stefanBoltzmann);
  });
});

describe('windows', () => {
  const windows = (lines: string, text = sound) => onlyCase(`${text}windows: { ${lines} }\n`).windows;
  const lit = edited(['  mass', '  temperature: 5780 K\n  mass']);

  test('temperatures and instellations', () => {
    expect(windows('a: 0 degC to 100 degC, b: 273.15 to 373.15 K, c: 0.32 to 1.1 S0')).toEqual([
      { name: 'a', of: 'temperature', from: 273.15, to: 373.15 },
      { name: 'b', of: 'temperature', from: 273.15, to: 373.15 },
      { name: 'c', of: 'instellation', from: 0.32 * 1361, to: 1.1 * 1361 },
    ]);
  });

  test('published habitable limits', () => {
    // Kopparapu et al. (2014) ApJ 787, L29, table 1, at 5780 K: 1.107 and 0.356 of the solar constant.
    const [window] = windows('hz: { habitable: [runawayGreenhouse, maximumGreenhouse] }', lit);
    expect(window).toMatchObject({ of: 'instellation', name: 'hz' });
    expectNear(window!.from, 0.356 * 1361);
    expectNear(window!.to, 1.107 * 1361);
    expect(window!.unavailable).toBeUndefined();
  });

  test('where the limits were not published, a reason instead', () => {
    const hz = 'hz: { habitable: [runawayGreenhouse, maximumGreenhouse] }';
    const hot = edited(['  mass', '  temperature: 7300 K\n  mass']);
    expect(windows(hz)[0]!.unavailable).toBe(
      'the habitable limits depend on the temperature of the star, which is not given',
    );
    expect(windows(hz, hot)[0]!.unavailable).toBe(
      'the star has 7300 K; the habitable limits were published for 2600 to 7200 K',
    );
  });
});

describe('how to solve', () => {
  const options = (solve: string) => onlyCase(`${sound}solve: ${solve}\n`).options;

  test('defaults', () => {
    expect(onlyCase(sound).options).toEqual({
      tolerance: 1e-6,
      start: 'periodic',
      samples: 720,
      spacing: 'balancedAnomaly',
    });
  });

  test('a forward run, from periapsis unless said otherwise', () => {
    expect(options('{ start: { temperature: 250 K, orbits: 2.5 } }').start).toEqual({
      temperature: 250,
      orbits: 2.5,
      at: 0,
    });
    expect(options('{ start: { temperature: 250 K, orbits: 2, at: 180 deg } }').start).toEqual({
      temperature: 250,
      orbits: 2,
      at: Math.PI,
    });
  });

  test('tolerance, samples, spacing', () => {
    expect(options('{ tolerance: 1e-11, samples: 16, spacing: time }')).toMatchObject({
      tolerance: 1e-11,
      samples: 16,
      spacing: 'time',
    });
    expect(options("{ tolerance: '0.01', samples: '100000' }")).toMatchObject({ tolerance: 0.01, samples: 100_000 });
  });
});

describe('what follows, and what is used', () => {
  test('derived values, each by its formula', () => {
    const found = onlyCase(edited(['  bondAlbedo', '  mass: 4 Mearth\n  radius: 1.6 Rearth\n  bondAlbedo']));
    const { star, orbit } = found.world;
    const [a, e] = [orbit.semiMajorAxis, 0.62];
    const flux = star.luminosity / (4 * Math.PI * a * a);
    expectNear(derived(found, 'orbit.orbitMeanInstellation'), flux / Math.sqrt(1 - e * e));
    expectNear(derived(found, 'orbit.periapsisDistance'), a * (1 - e));
    expectNear(derived(found, 'orbit.apoapsisDistance'), a * (1 + e));
    expectNear(derived(found, 'orbit.periapsisInstellation'), flux / (1 - e) ** 2);
    expectNear(derived(found, 'orbit.apoapsisInstellation'), flux / (1 + e) ** 2);
    expectNear(derived(found, 'planet.equilibriumTemperature'), ((flux * 0.7) / (4 * stefanBoltzmann)) ** 0.25);
    expectNear(derived(found, 'planet.gravity'), (gravitationalConstant * 4 * earthMass) / (1.6 * earthRadius) ** 2);
    expect(derived(found, 'orbit.period')).toBe(orbit.period);
    expect(derived(found, 'planet.heatCapacity')).toBe(found.world.surface.heatCapacity);
  });

  test('inputs: text as typed, SI, distribution, defaults marked, unused named', () => {
    const text = edited(
      ['eccentricity: 0.62', 'eccentricity: 0.620 ± 0.03\n  inclination: isotropic\n  argumentOfPeriapsis: 105 deg'],
      ['  bondAlbedo: 0.3', '  bondAlbedo: 0.30\n  obliquity: 23 deg\n  rotationPeriod: 26 h'],
    );
    const { inputs } = onlyCase(text);
    const input = (key: string) => inputs.find((one) => one.key === key);
    expect(input('orbit.eccentricity')).toEqual({
      key: 'orbit.eccentricity',
      value: 0.62,
      unit: '1',
      writtenUnit: '1',
      text: '0.620 ± 0.03',
      distribution: { form: 'normal', sigma: 0.03 },
      isDefault: false,
      used: true,
      label: 'Eccentricity',
    });
    expect(input('planet.bondAlbedo')).toMatchObject({ value: 0.3, text: '0.30', isDefault: false, used: true });
    expect(input('planet.emissivity')).toMatchObject({ value: 1, text: '1', isDefault: true, used: true });
    expect(input('planet.heatStore.mixedLayer')).toMatchObject({ value: 20, unit: 'm', label: 'Mixed layer depth' });
    expect(input('solve.seed') ?? input('planet.mass')).toBeUndefined(); // nothing hangs on them unless they are given
    const unused = inputs.filter(({ used, isDefault }) => !used && !isDefault).map(({ key }) => key);
    expect(unused).toEqual([
      'orbit.inclination',
      'orbit.argumentOfPeriapsis',
      'planet.obliquity',
      'planet.rotationPeriod',
    ]);
  });

  test('a key counts as used where something hangs on it', () => {
    const isUsed = (text: string, key: string) => onlyCase(text).inputs.find((one) => one.key === key)?.used;
    const transit = edited([
      'eccentricity: 0.62',
      'eccentricity: 0.62\n  argumentOfPeriapsis: 5 deg\n  transitTime: 2461103.71 TDB',
    ]);
    expect(isUsed(transit, 'orbit.argumentOfPeriapsis')).toBe(true);
    const spun = edited([
      '{ mixedLayer: 20 m }',
      '{ ground: { thermalInertia: 9 tiu, cycle: rotation } }\n  rotationPeriod: 26 h',
    ]);
    expect(isUsed(spun, 'planet.rotationPeriod')).toBe(true);
    const ramp = edited(['bondAlbedo: 0.3', 'albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K, p2: 0.1 }']);
    expect(isUsed(ramp, 'planet.albedo.p2')).toBe(false);
    expect(isUsed(ramp, 'planet.albedo.ice')).toBe(true);
  });

  test('a run uses the centre of what is uncertain', () => {
    expect(withPlanet('bondAlbedo: 0.1 to 0.5').world.surface.albedo.warm).toBeCloseTo(0.3, 15);
    expectNear(withStore('{ heatCapacity: 1e5 to 1e9 J/m2/K log }').world.surface.heatCapacity, 1e7);
  });

  test('a periapsis within three stellar radii is warned about', () => {
    expect(onlyCase(edited(['  mass', '  radius: 15 Rsun\n  mass'])).warnings).toEqual([
      'Periapsis lies 2.61 stellar radii from the centre of the star: nearer than 3, where the star is no point of light and tides matter.',
    ]);
  });
});

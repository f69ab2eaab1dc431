/** Broken files, each with every message that it must give: where, what was found, how to mend it. */
import { expect, test } from 'vitest';
import { complaints, edited, sound } from './sound.ts';

interface Broken {
  readonly name: string;
  readonly text: string;
  readonly says: readonly string[];
}

const table: readonly Broken[] = [
  {
    name: 'empty',
    text: '',
    says: [
      'p.yaml:1:1: scenario: the file is empty. Write keys and values such as star:, orbit:, planet:; a starter comes from the command new.',
    ],
  },
  {
    name: 'only comment',
    text: '# x\n',
    says: [
      'p.yaml:1:1: scenario: the file is empty. Write keys and values such as star:, orbit:, planet:; a starter comes from the command new.',
    ],
  },
  {
    name: 'list',
    text: '- a\n',
    says: [
      'p.yaml:1:1: scenario: the file is a list. Write keys and values such as star:, orbit:, planet:; a starter comes from the command new.',
    ],
  },
  {
    name: 'a word',
    text: 'hello',
    says: [
      'p.yaml:1:1: scenario: the file is a single value. Write keys and values such as star:, orbit:, planet:; a starter comes from the command new.',
    ],
  },
  {
    name: 'tab',
    text: 'star:\n\tmass: 1 Msun',
    says: ['p.yaml:2:1: syntax: a tab indents this line. Indent with spaces.'],
  },
  {
    name: 'key twice',
    text: `${sound}title: again\n`,
    says: ['p.yaml:11:1: syntax: the key `title` stands twice in the same section. Keep one of the two.'],
  },
  {
    name: 'section twice',
    text: `${sound}orbit: { period: 3 d }\n`,
    says: ['p.yaml:11:1: syntax: the key `orbit` stands twice in the same section. Keep one of the two.'],
  },
  {
    name: 'unclosed {',
    text: edited(['20 m }', '20 m']),
    says: ['p.yaml:11:1: syntax: a closing } is missing. Close what was opened with }.'],
  },
  {
    name: 'unclosed quote',
    text: edited(['Test', '"Test']),
    says: ['p.yaml:11:1: syntax: a closing " is missing. Close the quoted text.'],
  },
  {
    name: 'no space',
    text: edited(['mass: 0.85', 'mass:0.85']),
    says: ['p.yaml:4:3: syntax: a space is missing after `mass:`. Write `mass: 0.85 Msun`.'],
  },
  {
    name: 'comma missing',
    text: edited(['{ mixedLayer: 20 m }', '{ mixedLayer: 20 m heatCapacity: 4 }']),
    says: [
      'p.yaml:10:28: syntax: a comma or a closing bracket is missing inside { } or [ ]. Separate the entries with commas, as in { warm: 0.3, ice: 0.6 }.',
    ],
  },
  {
    name: 'bad indentation',
    text: edited(['  mass', '   mass']),
    says: [
      'p.yaml:3:15: syntax: the next line is indented deeper than this one. Start keys of one section in the same column.',
    ],
  },
  {
    name: 'bad dedent',
    text: edited(['  mass', ' mass']),
    says: [
      'p.yaml:4:1: syntax: the indentation does not fit the lines above. Start keys of one section in the same column.',
    ],
  },
  {
    name: 'tag',
    text: edited(['0.62', '!!float 0.62']),
    says: ['p.yaml:7:25: orbit.eccentricity: the tag !!float is not used here. Delete the tag.'],
  },
  {
    name: 'alias',
    text: edited(['0.62', '*ecc']),
    says: ['p.yaml:7:17: orbit.eccentricity: *ecc points to nothing. Write &ecc before an earlier value.'],
  },
  {
    name: 'several documents',
    text: 'title: a\n---\ntitle: b\n',
    says: ['p.yaml:2:1: syntax: the file holds several documents. Keep one scenario a file, without --- or ... lines.'],
  },
  {
    name: 'yaml 1.1',
    text: '%YAML 1.1\n---\ntitle: a\n',
    says: ['p.yaml:1:1: syntax: the file asks for YAML 1.1. Remove the %YAML line.'],
  },
  {
    name: 'merge key',
    text: edited(['  mass:', '  <<: { radius: 1 Rsun }\n  mass:']),
    says: ['p.yaml:4:3: star.<<: `<<` belongs to YAML 1.1. Write the keys out, or use cases.'],
  },
  {
    name: 'no unit',
    text: edited(['0.48 au', '0.48']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `0.48` has no unit. Write e.g. `0.48 au`.'],
  },
  {
    name: 'wrong unit',
    text: edited(['0.48 au', '0.48 kg']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `0.48 kg` is a mass, not a length. Write e.g. `0.48 au`.'],
  },
  {
    name: 'misspelt unit',
    text: edited(['0.48 au', '0.48 aus']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `aus` is not a unit. Did you mean `au`?'],
  },
  {
    name: 'case unit',
    text: edited(['20 m', '20 M']),
    says: ['p.yaml:10:28: planet.heatStore.mixedLayer: `M` is not a unit. Did you mean `m`?'],
  },
  {
    name: 'parsec',
    text: edited(['0.48 au', '0.48 pc']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `pc` is not a unit. Use `au` or `km` or `m`.'],
  },
  {
    name: 'dex',
    text: edited(['0.62', '0.62 dex']),
    says: ['p.yaml:7:17: orbit.eccentricity: `dex` is not a unit. Leave the unit out.'],
  },
  {
    name: 'negative',
    text: edited(['0.48 au', '-0.48 au']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `-0.48 au` is out of bounds. Keep it above 0 au.'],
  },
  {
    name: 'zero',
    text: edited(['0.48 au', '0 au']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `0 au` is out of bounds. Keep it above 0 au.'],
  },
  {
    name: 'comma decimal',
    text: edited(['0.48 au', '0,48 au']),
    says: [
      'p.yaml:6:18: orbit.semiMajorAxis: `0,48 au` has a comma. Write a decimal point and no thousands separator.',
    ],
  },
  {
    name: 'a word (2)',
    text: edited(['0.48 au', 'wide']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `wide` is not a number. Write e.g. `0.48 au`.'],
  },
  {
    name: 'boolean',
    text: edited(['0.48 au', 'true']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `true` is not understood. Write e.g. 0.48 au.'],
  },
  {
    name: 'empty value',
    text: edited(['0.48 au', '']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: no value is given. Write e.g. 0.48 au, or delete the line.'],
  },
  {
    name: 'null',
    text: edited(['0.48 au', 'null']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: no value is given. Write e.g. 0.48 au, or delete the line.'],
  },
  {
    name: 'list value',
    text: edited(['0.48 au', '[0.48 au]']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: a list stands here. Write e.g. 0.48 au.'],
  },
  {
    name: 'map value',
    text: edited(['0.48 au', '{ a: 1 }']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: a section stands here. Write e.g. 0.48 au.'],
  },
  {
    name: 'infinity',
    text: edited(['0.62', '.inf']),
    says: ['p.yaml:7:17: orbit.eccentricity: `.inf` is not a number. Write e.g. `0.62`.'],
  },
  {
    name: 'nan',
    text: edited(['0.62', '.nan']),
    says: ['p.yaml:7:17: orbit.eccentricity: `.nan` is not a number. Write e.g. `0.62`.'],
  },
  {
    name: 'huge',
    text: edited(['0.48 au', '1e400 au']),
    says: ['p.yaml:6:18: orbit.semiMajorAxis: `1e400` is not a finite number. Write a smaller one.'],
  },
  {
    name: 'eccentricity 1',
    text: edited(['0.62', '1']),
    says: ['p.yaml:7:17: orbit.eccentricity: `1` is out of bounds. Keep it at least 0 and below 1.'],
  },
  {
    name: 'eccentricity below 0',
    text: edited(['0.62', '-0.1']),
    says: ['p.yaml:7:17: orbit.eccentricity: `-0.1` is out of bounds. Keep it at least 0 and below 1.'],
  },
  {
    name: 'eccentricity beyond the solver',
    text: edited(['0.62', '0.99995']),
    says: [
      'p.yaml:7:17: orbit.eccentricity: the eccentricity is 0.99995; the solver is accurate up to 0.9999. Keep it at or below 0.9999.',
    ],
  },
  {
    name: 'eccentricity with a unit',
    text: edited(['0.62', '0.62 deg']),
    says: ['p.yaml:7:17: orbit.eccentricity: `0.62 deg` is an angle, not a pure number. Write e.g. `0.62`.'],
  },
  {
    name: 'spread of zero',
    text: edited(['0.62', '0.62 ± 0']),
    says: [
      'p.yaml:7:17: orbit.eccentricity: the spread in `0.62 ± 0` is not above zero. Write a positive spread, or leave it out.',
    ],
  },
  {
    name: 'range falls',
    text: edited(['0.62', '0.7 to 0.6']),
    says: ['p.yaml:7:17: orbit.eccentricity: `0.7 to 0.6` does not rise. Write the smaller number first.'],
  },
  {
    name: 'limit without confidence',
    text: edited(['0.62', '< 0.7']),
    says: ['p.yaml:7:17: orbit.eccentricity: `< 0.7` does not say how sure it is. Write a limit as in `< 0.12 (95%)`.'],
  },
  {
    name: 'symbols for keys',
    text: edited(['semiMajorAxis', 'a'], ['eccentricity', 'e'], ['luminosity', 'L']),
    says: [
      'p.yaml:3:3: star.L: `L` is not a key of star. Did you mean `luminosity`?',
      'p.yaml:6:3: orbit.a: `a` is not a key of orbit. Did you mean `semiMajorAxis`?',
      'p.yaml:7:3: orbit.e: `e` is not a key of orbit. Did you mean `eccentricity`?',
    ],
  },
  {
    name: 'case for cases',
    text: `${sound}case:\n  wet: {}\n`,
    says: ['p.yaml:11:1: case: `case` is not a key of a scenario. Did you mean `cases`?'],
  },
  {
    name: 'Cases for cases',
    text: `${sound}Cases:\n  wet: {}\n`,
    says: ['p.yaml:11:1: Cases: `Cases` is not a key of a scenario. Did you mean `cases`?'],
  },
  {
    name: 'cases in a section',
    text: edited(['  bondAlbedo', '  cases: {}\n  bondAlbedo']),
    says: ['p.yaml:9:3: planet.cases: `cases` is not a key of planet. It belongs at the top of the file.'],
  },
  {
    name: 'a day as the cycle of ground',
    text: edited(['{ mixedLayer: 20 m }', '{ ground: { thermalInertia: 9 tiu, cycle: day } }']),
    says: [
      "p.yaml:10:56: planet.heatStore.ground.cycle: `day` does not say whose day. Write rotation for the planet's own day (it needs planet.rotationPeriod), or a time, e.g. 26 h.",
    ],
  },
  {
    name: 'a year as the cycle of ground',
    text: edited(['{ mixedLayer: 20 m }', '{ ground: { thermalInertia: 9 tiu, cycle: year } }']),
    says: [
      "p.yaml:10:56: planet.heatStore.ground.cycle: `year` is not known here. Write orbit for the planet's own year, or a time, e.g. 130 d.",
    ],
  },
  {
    name: 'habitable limits the wrong way round',
    text: `${sound}windows: { hz: { habitable: [maximumGreenhouse, runawayGreenhouse] } }\n`,
    says: [
      'p.yaml:11:29: windows.hz.habitable: maximumGreenhouse lies farther out than runawayGreenhouse. Write the inner limit first: [runawayGreenhouse, maximumGreenhouse].',
    ],
  },
  {
    name: 'misspelt key',
    text: edited(['eccentricity', 'eccentricty']),
    says: ['p.yaml:7:3: orbit.eccentricty: `eccentricty` is not a key of orbit. Did you mean `eccentricity`?'],
  },
  {
    name: 'misspelt section',
    text: edited(['planet:', 'plannet:']),
    says: ['p.yaml:8:1: plannet: `plannet` is not a key of a scenario. Did you mean `planet`?'],
  },
  {
    name: 'wrong section',
    text: edited(['  mass: 0.85 Msun', '  obliquity: 23 deg']),
    says: [
      'p.yaml:4:3: star.obliquity: `obliquity` is not a key of star. It belongs in planet.',
      'p.yaml:5:1: orbit: the period is not known. Add star.mass, e.g. 0.85 Msun, or orbit.period, e.g. 130 d.',
    ],
  },
  {
    name: 'unknown key',
    text: edited(['title: Test', 'colour: red']),
    says: [
      'p.yaml:1:1: colour: `colour` is not a key of a scenario. Keys here are `title`, `notes`, `model`, `star`, `orbit`, `planet`, `posterior`, `cases`, `windows`, `solve`.',
    ],
  },
  {
    name: 'section as value',
    text: edited(['planet:\n  bondAlbedo: 0.3\n  heatStore: { mixedLayer: 20 m }\n', 'planet: rocky\n']),
    says: ['p.yaml:8:9: planet: `rocky` is not a section. Write planet: and below it, indented, keys such as radius:.'],
  },
  {
    name: 'section list',
    text: edited(['orbit:\n  semiMajorAxis: 0.48 au\n  eccentricity: 0.62', 'orbit: [1, 2]']),
    says: ['p.yaml:5:8: orbit: a list stands here. Write orbit: and below it, indented, keys such as semiMajorAxis:.'],
  },
  {
    name: 'missing star',
    text: edited(['star:\n  luminosity: 0.52 Lsun\n  mass: 0.85 Msun\n', '']),
    says: [
      'p.yaml:1:1: star: no luminosity is given. Write luminosity, e.g. 0.52 Lsun, or temperature and radius.',
      'p.yaml:2:1: orbit: the period is not known. Add star.mass, e.g. 0.85 Msun, or orbit.period, e.g. 130 d.',
    ],
  },
  {
    name: 'no luminosity',
    text: edited(['  luminosity: 0.52 Lsun\n', '']),
    says: ['p.yaml:2:1: star: no luminosity is given. Write luminosity, e.g. 0.52 Lsun, or temperature and radius.'],
  },
  {
    name: 'temperature alone',
    text: edited(['luminosity: 0.52 Lsun', 'temperature: 5100 K']),
    says: [
      'p.yaml:2:1: star: temperature alone does not give a luminosity. Write luminosity, e.g. 0.52 Lsun, or temperature and radius.',
    ],
  },
  {
    name: 'radius alone',
    text: edited(['luminosity: 0.52 Lsun', 'radius: 1 Rsun']),
    says: [
      'p.yaml:2:1: star: radius alone does not give a luminosity. Write luminosity, e.g. 0.52 Lsun, or temperature and radius.',
    ],
  },
  {
    name: 'luminosity disagrees with temperature and radius',
    text: edited(['  mass', '  temperature: 5100 K\n  radius: 1.2 Rsun\n  mass']),
    says: [
      'p.yaml:3:15: star.luminosity: 0.87768 Lsun (from temperature 5100 K and radius 1.2 Rsun) and luminosity 0.52 Lsun differ by 69 %; at most 1 % is allowed. Correct one of them, or leave one out.',
    ],
  },
  {
    name: 'no mass',
    text: edited(['  mass: 0.85 Msun\n', '']),
    says: ['p.yaml:4:1: orbit: the period is not known. Add star.mass, e.g. 0.85 Msun, or orbit.period, e.g. 130 d.'],
  },
  {
    name: 'mass and density',
    text: edited(['  mass', '  density: 1 g/cm3\n  mass']),
    says: ['p.yaml:4:3: star.density: `mass` and `density` say the same thing in two ways. Keep one of them.'],
  },
  {
    name: 'density without radius',
    text: edited(['mass: 0.85 Msun', 'density: 1 g/cm3']),
    says: [
      'p.yaml:4:12: star.density: the density gives a mass only with a radius. Add star.radius, e.g. 0.924 Rsun, or write star.mass.',
    ],
  },
  {
    name: 'density misspelt unit',
    text: edited(['mass: 0.85 Msun', 'density: 1 g/ccm']),
    says: ['p.yaml:4:12: star.density: `ccm` is not a unit. Did you mean `cm`?'],
  },
  {
    name: 'no orbit',
    text: edited(['orbit:\n  semiMajorAxis: 0.48 au\n  eccentricity: 0.62\n', '']),
    says: [
      'p.yaml:1:1: orbit: no eccentricity is given. Write eccentricity: 0 for a circle, or e.g. 0.62.',
      'p.yaml:1:1: orbit: no size is given. Write semiMajorAxis, e.g. 0.48 au; or period, scaledSemiMajorAxis or instellation.',
    ],
  },
  {
    name: 'no size of the orbit',
    text: edited(['  semiMajorAxis: 0.48 au\n', '']),
    says: [
      'p.yaml:5:1: orbit: no size is given. Write semiMajorAxis, e.g. 0.48 au; or period, scaledSemiMajorAxis or instellation.',
    ],
  },
  {
    name: 'no eccentricity',
    text: edited(['  eccentricity: 0.62\n', '']),
    says: ['p.yaml:5:1: orbit: no eccentricity is given. Write eccentricity: 0 for a circle, or e.g. 0.62.'],
  },
  {
    name: 'period without mass',
    text: edited(['semiMajorAxis: 0.48 au', 'period: 130 d'], ['  mass: 0.85 Msun\n', '']),
    says: [
      'p.yaml:5:11: orbit.period: the period gives an axis only with the mass of the star. Add star.mass, e.g. 0.85 Msun, or orbit.semiMajorAxis.',
    ],
  },
  {
    name: 'a/R* without radius',
    text: edited(['semiMajorAxis: 0.48 au', 'scaledSemiMajorAxis: 100']),
    says: [
      'p.yaml:6:24: orbit.scaledSemiMajorAxis: a/R* gives an axis only with the radius of the star. Add star.radius, e.g. 0.924 Rsun.',
    ],
  },
  {
    name: 'third law',
    text: edited(['  eccentricity', '  period: 100 d\n  eccentricity']),
    says: [
      'p.yaml:6:18: orbit.semiMajorAxis: semiMajorAxis 0.48 au and 0.3994 au (from period 100 d and star mass 0.85 Msun) differ by 20 %; at most 1 % is allowed. Correct one of them, or leave one out.',
    ],
  },
  {
    name: 'axis and instellation disagree',
    text: edited(['  eccentricity', '  instellation: 1 S0\n  eccentricity']),
    says: [
      'p.yaml:7:17: orbit.instellation: 0.72115 au (from instellation 1 S0 and luminosity 0.52 Lsun) and semiMajorAxis 0.48 au differ by 50 %; at most 1 % is allowed. Correct one of them, or leave one out.',
    ],
  },
  {
    name: 'instellation without luminosity',
    text: edited(['semiMajorAxis: 0.48 au', 'instellation: 1.3 S0'], ['  luminosity: 0.52 Lsun\n', '']),
    says: ['p.yaml:2:1: star: no luminosity is given. Write luminosity, e.g. 0.52 Lsun, or temperature and radius.'],
  },
  {
    name: 'planet heavier',
    text: edited(
      ['  mass: 0.85 Msun\n', ''],
      ['  eccentricity', '  period: 130 d\n  eccentricity'],
      ['  bondAlbedo', '  mass: 3 Msun\n  bondAlbedo'],
    ),
    says: [
      'p.yaml:9:9: planet.mass: axis and period imply 0.873 Msun for star and planet together, less than the planet alone. Correct the mass, the axis or the period.',
    ],
  },
  {
    name: 'eccentricity in two ways',
    text: edited(['  eccentricity: 0.62', '  eccentricity: 0.62\n  eCosOmega: 0.1\n  eSinOmega: 0.1']),
    says: [
      'p.yaml:8:3: orbit.eCosOmega: `eccentricity` and `eCosOmega`, `eSinOmega` say the same thing in two ways. Keep one of them.',
    ],
  },
  {
    name: 'eCos alone',
    text: edited(['eccentricity: 0.62', 'eCosOmega: 0.1']),
    says: ['p.yaml:7:14: orbit.eCosOmega: eCosOmega alone gives no eccentricity. Add eSinOmega.'],
  },
  {
    name: 'pair unbound',
    text: edited(['eccentricity: 0.62', 'eCosOmega: 0.9\n  eSinOmega: 0.9']),
    says: [
      'p.yaml:7:14: orbit.eCosOmega: eCosOmega 0.9 and eSinOmega 0.9 give an eccentricity of 1 or more. A bound orbit has an eccentricity below 1.',
    ],
  },
  {
    name: 'sqrt pair unbound',
    text: edited(['eccentricity: 0.62', 'sqrtECosOmega: 0.9\n  sqrtESinOmega: 0.9']),
    says: [
      'p.yaml:7:18: orbit.sqrtECosOmega: sqrtECosOmega 0.9 and sqrtESinOmega 0.9 give an eccentricity of 1 or more. A bound orbit has an eccentricity below 1.',
    ],
  },
  {
    name: 'omega with pair',
    text: edited(['eccentricity: 0.62', 'eCosOmega: 0.1\n  eSinOmega: 0.2\n  argumentOfPeriapsis: 3 deg']),
    says: [
      'p.yaml:7:3: orbit.eCosOmega: `argumentOfPeriapsis` and `eCosOmega`, `eSinOmega` say the same thing in two ways. Keep one of them.',
    ],
  },
  {
    name: 'inside star',
    text: edited(['  mass', '  radius: 60 Rsun\n  mass']),
    says: [
      'p.yaml:8:17: orbit.eccentricity: periapsis lies inside the star, at 0.654 of its radii from the centre. Lower the eccentricity or widen the orbit.',
    ],
  },
  {
    name: 'date no zone',
    text: edited(['  eccentricity', '  periapsisTime: 2026-03-04T05:00\n  eccentricity']),
    says: [
      'p.yaml:7:18: orbit.periapsisTime: `2026-03-04T05:00` has no time zone. Add Z for UTC: `2026-03-04T05:00Z`.',
    ],
  },
  {
    name: 'date bad',
    text: edited(['  eccentricity', '  periapsisTime: tomorrow\n  eccentricity']),
    says: [
      'p.yaml:7:18: orbit.periapsisTime: `tomorrow` is not a date. Write e.g. `2026-03-04T05:00Z` or `2461103.71 TDB`.',
    ],
  },
  {
    name: 'JD no scale',
    text: edited(['  eccentricity', '  periapsisTime: 2461103.71\n  eccentricity']),
    says: [
      'p.yaml:7:18: orbit.periapsisTime: `2461103.71` has no time scale. Write `2461103.71 TDB` or `2461103.71 UTC`.',
    ],
  },
  {
    name: 'transit without argument of periapsis',
    text: edited(['  eccentricity', '  transitTime: 2461103.71 TDB\n  eccentricity']),
    says: [
      'p.yaml:7:16: orbit.transitTime: a transit tells when periapsis is only with argumentOfPeriapsis. Add argumentOfPeriapsis, e.g. 105 deg, or write periapsisTime.',
    ],
  },
  {
    name: 'epoch alone',
    text: edited(['  eccentricity', '  epoch: 2461103.71 TDB\n  eccentricity']),
    says: ['p.yaml:7:10: orbit.epoch: an epoch alone places no planet. Add meanAnomaly, e.g. 212 deg.'],
  },
  {
    name: 'mean anomaly alone',
    text: edited(['  eccentricity', '  meanAnomaly: 3 deg\n  eccentricity']),
    says: ['p.yaml:7:16: orbit.meanAnomaly: a mean anomaly alone has no date. Add epoch, e.g. 2461103.71 TDB.'],
  },
  {
    name: 'two dates',
    text: edited(['  eccentricity', '  periapsisTime: 2461103.71 TDB\n  transitTime: 2461103.71 TDB\n  eccentricity']),
    says: [
      'p.yaml:8:3: orbit.transitTime: `periapsisTime` and `transitTime` say the same thing in two ways. Keep one of them.',
    ],
  },
  {
    name: 'inclination',
    text: edited(['  eccentricity', '  inclination: 200 deg\n  eccentricity']),
    says: ['p.yaml:7:16: orbit.inclination: `200 deg` is out of bounds. Keep it at least 0 deg and at most 180 deg.'],
  },
  {
    name: 'no planet',
    text: edited(['planet:\n  bondAlbedo: 0.3\n  heatStore: { mixedLayer: 20 m }\n', '']),
    says: [
      'p.yaml:1:1: planet: no albedo is given. Write bondAlbedo, e.g. 0.3, or albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }.',
      'p.yaml:1:1: planet: no heat store is given. Write heatStore, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground.',
    ],
  },
  {
    name: 'no albedo',
    text: edited(['  bondAlbedo: 0.3\n', '']),
    says: [
      'p.yaml:8:1: planet: no albedo is given. Write bondAlbedo, e.g. 0.3, or albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }.',
    ],
  },
  {
    name: 'albedo 1',
    text: edited(['0.3', '1']),
    says: ['p.yaml:9:15: planet.bondAlbedo: `1` is out of bounds. Keep it at least 0 and below 1.'],
  },
  {
    name: 'albedo percent',
    text: edited(['0.3', '130 %']),
    says: ['p.yaml:9:15: planet.bondAlbedo: `130 %` is out of bounds. Keep it at least 0 % and below 100 %.'],
  },
  {
    name: 'both albedos',
    text: edited(['  heatStore', '  albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K }\n  heatStore']),
    says: ['p.yaml:10:3: planet.albedo: `bondAlbedo` and `albedo` say the same thing in two ways. Keep one of them.'],
  },
  {
    name: 'ramp turned',
    text: edited(['bondAlbedo: 0.3', 'albedo: { warm: 0.3, ice: 0.6, from: 280 K, to: 273 K }']),
    says: [
      'p.yaml:9:40: planet.albedo.from: `from` 280 K is above `to` 273 K. All ice at `from` and below, none at `to` and above: swap them.',
    ],
  },
  {
    name: 'ramp incomplete',
    text: edited(['bondAlbedo: 0.3', 'albedo: { warm: 0.3, ice: 0.6, from: 258 K }']),
    says: ['p.yaml:9:3: planet.albedo.to: nothing is given. Write e.g. 273 K.'],
  },
  {
    name: 'ramp typo',
    text: edited(['bondAlbedo: 0.3', 'albedo: { warm: 0.3, icy: 0.6, from: 258 K, to: 273 K }']),
    says: ['p.yaml:9:24: planet.albedo.icy: `icy` is not a key of planet.albedo. Did you mean `ice`?'],
  },
  {
    name: 'albedo number',
    text: edited(['bondAlbedo: 0.3', 'albedo: 0.3']),
    says: [
      'p.yaml:9:11: planet.albedo: `0.3` is not a ramp. Write bondAlbedo: 0.3, or albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }.',
    ],
  },
  {
    name: 'emissivity 0',
    text: edited(['  heatStore', '  emissivity: 0\n  heatStore']),
    says: ['p.yaml:10:15: planet.emissivity: `0` is out of bounds. Keep it above 0 and at most 1.'],
  },
  {
    name: 'both emissions',
    text: edited(['  heatStore', '  emissivity: 1\n  emission: { opticalDepth: 1 }\n  heatStore']),
    says: [
      'p.yaml:11:3: planet.emission: `emissivity` and `emission` say the same thing in two ways. Keep one of them.',
    ],
  },
  {
    name: 'two laws',
    text: edited(['  heatStore', '  emission: { opticalDepth: 1, linear: { a: 203 W/m2, b: 2 W/m2/K } }\n  heatStore']),
    says: ['p.yaml:10:13: planet.emission: opticalDepth and linear are two laws. Keep one of them.'],
  },
  {
    name: 'emission empty',
    text: edited(['  heatStore', '  emission: {}\n  heatStore']),
    says: ['p.yaml:10:13: planet.emission: the emission law is empty. Write e.g. { opticalDepth: 0.83 }.'],
  },
  {
    name: 'linear impossible',
    text: edited(['  heatStore', '  emission: { linear: { a: 903 W/m2, b: 2 W/m2/K } }\n  heatStore']),
    says: [
      'p.yaml:10:23: planet.emission.linear: a 903 W/m2 and b 2 W/m2/K emit 356.7 W/m2 at absolute zero. Lower a or raise b; T is in °C, as the law is published.',
    ],
  },
  {
    name: 'linear b unit',
    text: edited(['  heatStore', '  emission: { linear: { a: 203 W/m2, b: 2 W/m2 } }\n  heatStore']),
    says: [
      'p.yaml:10:41: planet.emission.linear.b: `2 W/m2` is a flux, not a flux per kelvin. Write e.g. `2.09 W/m2/K`.',
    ],
  },
  {
    name: 'absorbing fraction above 1',
    text: edited(['  heatStore', '  absorbingFraction: 2\n  heatStore']),
    says: ['p.yaml:10:22: planet.absorbingFraction: `2` is out of bounds. Keep it above 0 and at most 1.'],
  },
  {
    name: 'internal heat below zero',
    text: edited(['  heatStore', '  internalHeat: -1 W/m2\n  heatStore']),
    says: ['p.yaml:10:17: planet.internalHeat: `-1 W/m2` is out of bounds. Keep it at least 0 W/m2.'],
  },
  {
    name: 'no store',
    text: edited(['  heatStore: { mixedLayer: 20 m }\n', '']),
    says: [
      'p.yaml:8:1: planet: no heat store is given. Write heatStore, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground.',
    ],
  },
  {
    name: 'store empty',
    text: edited(['{ mixedLayer: 20 m }', '{}']),
    says: [
      'p.yaml:10:14: planet.heatStore: the heat store is empty. Write one of heatCapacity, mixedLayer, atmosphere, ground.',
    ],
  },
  {
    name: 'store empty list',
    text: edited(['{ mixedLayer: 20 m }', '[]']),
    says: ['p.yaml:10:14: planet.heatStore: the list is empty. Write e.g. { mixedLayer: 20 m }.'],
  },
  {
    name: 'two forms',
    text: edited(['{ mixedLayer: 20 m }', '{ mixedLayer: 20 m, heatCapacity: 4e7 J/m2/K }']),
    says: [
      'p.yaml:10:14: planet.heatStore: heatCapacity and mixedLayer stand in one heat store. Keep one, or write a list that adds up: [{ heatCapacity: … }, { mixedLayer: … }].',
    ],
  },
  {
    name: 'form typo',
    text: edited(['{ mixedLayer: 20 m }', '{ mixedLayr: 20 m }']),
    says: [
      'p.yaml:10:16: planet.heatStore.mixedLayr: `mixedLayr` is not a key of planet.heatStore. Did you mean `mixedLayer`?',
    ],
  },
  {
    name: 'bare depth',
    text: edited(['{ mixedLayer: 20 m }', '20 m']),
    says: ['p.yaml:10:14: planet.heatStore: `20 m` is not a section. Write e.g. { mixedLayer: 20 m }.'],
  },
  {
    name: 'air without gravity',
    text: edited(['{ mixedLayer: 20 m }', '{ atmosphere: { surfacePressure: 1 bar, specificHeat: 1004 J/kg/K } }']),
    says: [
      'p.yaml:10:28: planet.heatStore.atmosphere: no gravity is given. Add gravity, e.g. 11 m/s2, or planet.mass and planet.radius.',
    ],
  },
  {
    name: 'air incomplete',
    text: edited(['{ mixedLayer: 20 m }', '{ atmosphere: { surfacePressure: 1 bar, gravity: 10 m/s2 } }']),
    says: ['p.yaml:10:16: planet.heatStore.atmosphere.specificHeat: nothing is given. Write e.g. 1004 J/kg/K.'],
  },
  {
    name: 'ground no cycle',
    text: edited(['{ mixedLayer: 20 m }', '{ ground: { thermalInertia: 2200 tiu } }']),
    says: ['p.yaml:10:16: planet.heatStore.ground.cycle: nothing is given. Write e.g. orbit.'],
  },
  {
    name: 'ground rotation',
    text: edited(['{ mixedLayer: 20 m }', '{ ground: { thermalInertia: 2200 tiu, cycle: rotation } }']),
    says: [
      'p.yaml:10:59: planet.heatStore.ground.cycle: rotation needs planet.rotationPeriod. Add it, e.g. 26 h, or write cycle: orbit or a time.',
    ],
  },
  {
    name: 'cycle typo',
    text: edited(['{ mixedLayer: 20 m }', '{ ground: { thermalInertia: 2200 tiu, cycle: orbital } }']),
    says: ['p.yaml:10:59: planet.heatStore.ground.cycle: `orbital` is not known here. Did you mean `orbit`?'],
  },
  {
    name: 'list item bad',
    text: edited(['{ mixedLayer: 20 m }', '[{ mixedLayer: 20 m }, { heatCapacity: 4 J }]']),
    says: [
      'p.yaml:10:53: planet.heatStore.1.heatCapacity: `4 J` is a quantity in m2 kg s-2, not a heat capacity per area. Write e.g. `4e7 J/m2/K`.',
    ],
  },
  {
    name: 'list item two',
    text: edited(['{ mixedLayer: 20 m }', '[{ mixedLayer: 20 m, heatCapacity: 4 J/m2/K }]']),
    says: [
      'p.yaml:10:15: planet.heatStore.0: heatCapacity and mixedLayer stand in one heat store. Keep one, or write a list that adds up: [{ heatCapacity: … }, { mixedLayer: … }].',
    ],
  },
  {
    name: 'rotation typo',
    text: edited(['  heatStore', '  rotationPeriod: synchronus\n  heatStore']),
    says: ['p.yaml:10:19: planet.rotationPeriod: `synchronus` is not known here. Did you mean `synchronous`?'],
  },
  {
    name: 'rotation 3:0',
    text: edited(['  heatStore', '  rotationPeriod: 3:0\n  heatStore']),
    says: ["p.yaml:10:19: planet.rotationPeriod: `3:0` is no resonance. Write turns : orbits, e.g. '3:2'."],
  },
  {
    name: 'rotation number',
    text: edited(['  heatStore', '  rotationPeriod: 3\n  heatStore']),
    says: ['p.yaml:10:19: planet.rotationPeriod: `3` has no unit. Write e.g. `3 d` or `3 h`.'],
  },
  {
    name: 'obliquity',
    text: edited(['  heatStore', '  obliquity: 200 deg\n  heatStore']),
    says: ['p.yaml:10:14: planet.obliquity: `200 deg` is out of bounds. Keep it at least 0 deg and at most 180 deg.'],
  },
  {
    name: 'window one',
    text: `${sound}windows: { warm: 300 K }\n`,
    says: [
      'p.yaml:11:18: windows.warm: `300 K` is not a range. Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K.',
    ],
  },
  {
    name: 'window falls',
    text: `${sound}windows: { warm: 300 K to 200 K }\n`,
    says: ['p.yaml:11:18: windows.warm: `300 K to 200 K` does not rise. Write the smaller number first.'],
  },
  {
    name: 'window flux falls',
    text: `${sound}windows: { warm: 2 S0 to 1 S0 }\n`,
    says: ['p.yaml:11:18: windows.warm: `2 S0 to 1 S0` does not rise. Write the smaller number first.'],
  },
  {
    name: 'window without unit',
    text: `${sound}windows: { warm: 300 to 400 }\n`,
    says: [
      'p.yaml:11:18: windows.warm: `300` has no unit. Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K.',
    ],
  },
  {
    name: 'window unit typo',
    text: `${sound}windows: { warm: 300 k to 400 k }\n`,
    says: ['p.yaml:11:18: windows.warm: `k` is not a unit. Did you mean `K`?'],
  },
  {
    name: 'window mixed',
    text: `${sound}windows: { warm: 300 K to 2 S0 }\n`,
    says: [
      'p.yaml:11:18: windows.warm: `2 S0` is a flux, not a temperature. Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K.',
    ],
  },
  {
    name: 'window length',
    text: `${sound}windows: { warm: 3 m to 4 m }\n`,
    says: [
      'p.yaml:11:18: windows.warm: `3 m` is a length, not a temperature. Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K.',
    ],
  },
  {
    name: 'window limit typo',
    text: `${sound}windows: { warm: { habitable: [runawayGrenhouse, maximumGreenhouse] } }\n`,
    says: [
      'p.yaml:11:32: windows.warm.habitable.0: `runawayGrenhouse` is not known here. Did you mean `runawayGreenhouse`?',
    ],
  },
  {
    name: 'window one limit',
    text: `${sound}windows: { warm: { habitable: [runawayGreenhouse] } }\n`,
    says: [
      'p.yaml:11:31: windows.warm.habitable: the list has 1 entry. Write e.g. [runawayGreenhouse, maximumGreenhouse].',
    ],
  },
  {
    name: 'window same',
    text: `${sound}windows: { warm: { habitable: [earlyMars, earlyMars] } }\n`,
    says: ['p.yaml:11:31: windows.warm.habitable: both limits are earlyMars. Name an inner and an outer limit.'],
  },
  {
    name: 'window key',
    text: `${sound}windows: { warm: { inhabitable: [earlyMars, earlyMars] } }\n`,
    says: [
      'p.yaml:11:20: windows.warm.inhabitable: `inhabitable` is not a key of windows.warm. Did you mean `habitable`?',
    ],
  },
  {
    name: 'window number',
    text: `${sound}windows: { warm: 5 }\n`,
    says: [
      'p.yaml:11:18: windows.warm: `5` is not a range. Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K.',
    ],
  },
  {
    name: 'windows list',
    text: `${sound}windows: [273 K to 373 K]\n`,
    says: ['p.yaml:11:10: windows: a list stands here. Write e.g. { liquid water: 273.15 K to 373.15 K }.'],
  },
  {
    name: 'window empty name',
    text: `${sound}windows: { '': 273 K to 373 K }\n`,
    says: ['p.yaml:11:12: windows: the name is empty. Name it with letters and digits.'],
  },
  {
    name: 'model column',
    text: `${sound}model: column\n`,
    says: ['p.yaml:11:8: model: no model `column` is built. Write `lumped` or `zonal`.'],
  },
  {
    name: 'model typo',
    text: `${sound}model: lumpd\n`,
    says: ['p.yaml:11:8: model: no model `lumpd` is built. Write `lumped` or `zonal`.'],
  },
  {
    name: 'tolerance',
    text: `${sound}solve: { tolerance: 1 }\n`,
    says: ['p.yaml:11:21: solve.tolerance: `1` is out of bounds. Keep it at least 1e-11 and at most 0.01.'],
  },
  {
    name: 'tolerance tiny',
    text: `${sound}solve: { tolerance: 1e-14 }\n`,
    says: ['p.yaml:11:21: solve.tolerance: `1e-14` is out of bounds. Keep it at least 1e-11 and at most 0.01.'],
  },
  {
    name: 'uncertain tolerance',
    text: `${sound}solve: { tolerance: 1e-6 ± 1e-7 }\n`,
    says: ['p.yaml:11:21: solve.tolerance: `1e-6 ± 1e-7` is uncertain. Write a single value here.'],
  },
  {
    name: 'samples',
    text: `${sound}solve: { samples: 7.5 }\n`,
    says: ['p.yaml:11:19: solve.samples: `7.5` is not a whole number from 16 to 100000. Write e.g. 720.'],
  },
  {
    name: 'samples many',
    text: `${sound}solve: { samples: 1e9 }\n`,
    says: ['p.yaml:11:19: solve.samples: `1e9` is not a whole number from 16 to 100000. Write e.g. 720.'],
  },
  {
    name: 'spacing',
    text: `${sound}solve: { spacing: tme }\n`,
    says: ['p.yaml:11:19: solve.spacing: `tme` is not known here. Did you mean `time`?'],
  },
  {
    name: 'start word',
    text: `${sound}solve: { start: periodik }\n`,
    says: ['p.yaml:11:17: solve.start: `periodik` is not known here. Did you mean `periodic`?'],
  },
  {
    name: 'start incomplete',
    text: `${sound}solve: { start: { temperature: 250 K } }\n`,
    says: ['p.yaml:11:10: solve.start.orbits: nothing is given. Write e.g. 20.'],
  },
  {
    name: 'start rows',
    text: `${sound}solve: { samples: 100000, start: { temperature: 250 K, orbits: 9999 } }\n`,
    says: [
      'p.yaml:11:64: solve.start.orbits: 9999 orbits of 100000 samples make 999900000 rows, more than 2000000. Run fewer orbits or lower samples.',
    ],
  },
  {
    name: 'start key',
    text: `${sound}solve: { start: { temperature: 250 K, orbit: 20 } }\n`,
    says: ['p.yaml:11:39: solve.start.orbit: `orbit` is not a key of solve.start. Did you mean `orbits`?'],
  },
  {
    name: 'solve key',
    text: `${sound}solve: { tolerence: 1e-6 }\n`,
    says: ['p.yaml:11:10: solve.tolerence: `tolerence` is not a key of solve. Did you mean `tolerance`?'],
  },
  {
    name: 'notes as a list',
    text: `${sound}notes: [a]\n`,
    says: ['p.yaml:11:8: notes: a list stands here. Write e.g. Elements from the 2025 fit.'],
  },
  {
    name: 'cases list',
    text: `${sound}cases:\n  - a\n`,
    says: [
      'p.yaml:11:1: cases: a list stands here. Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line.',
    ],
  },
  {
    name: 'cases empty',
    text: `${sound}cases: {}\n`,
    says: [
      'p.yaml:11:1: cases: no case is given. Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line.',
    ],
  },
  {
    name: 'cases null',
    text: `${sound}cases:\n`,
    says: [
      'p.yaml:11:1: cases: no case is given. Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line.',
    ],
  },
  {
    name: 'case null',
    text: `${sound}cases:\n  wet:\n`,
    says: [
      'p.yaml:12:3: cases.wet: the case is empty. Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line.',
    ],
  },
  {
    name: 'case word',
    text: `${sound}cases:\n  wet: yes\n`,
    says: [
      'p.yaml:12:3: cases.wet: a single value stands here. Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line.',
    ],
  },
  {
    name: 'case typo',
    text: `${sound}cases:\n  wet: { planet: { heatStor: { mixedLayer: 9 m } } }\n`,
    says: ['p.yaml:12:20: cases.wet.planet.heatStor: `heatStor` is not a key of planet. Did you mean `heatStore`?'],
  },
  {
    name: 'case bad',
    text: `${sound}cases:\n  dry: {}\n  wet: { planet: { heatStore: { mixedLayer: 9 } } }\n`,
    says: ['p.yaml:13:45: cases.wet.planet.heatStore.mixedLayer: `9` has no unit. Write e.g. `9 m`.'],
  },
  {
    name: 'case title',
    text: `${sound}cases:\n  wet: { title: x }\n`,
    says: [
      'p.yaml:12:10: cases.wet.title: `title` cannot change from case to case. Write it once, at the top of the file.',
    ],
  },
  {
    name: 'case null unknown',
    text: `${sound}cases:\n  wet: { planet: { bondAlbdo: null } }\n`,
    says: [
      'p.yaml:12:20: cases.wet.planet.bondAlbdo: `bondAlbdo: null` removes a key that is unknown. Did you mean `bondAlbedo`?',
    ],
  },
  {
    name: 'case removes',
    text: `${sound}cases:\n  dry: {}\n  bald: { planet: { heatStore: null } }\n`,
    says: [
      'p.yaml:13:21: cases.bald.planet.heatStore: no heat store is given. Write heatStore, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground.',
    ],
  },
  {
    name: 'case makes inside',
    text: `${sound}cases:\n  dry: {}\n  big: { star: { radius: 60 Rsun } }\n`,
    says: [
      'p.yaml:7:17: orbit.eccentricity: periapsis lies inside the star, at 0.654 of its radii from the centre (case `big`). Lower the eccentricity or widen the orbit.',
    ],
  },
  {
    name: 'case nested cases',
    text: `${sound}cases:\n  dry: { cases: {} }\n`,
    says: [
      'p.yaml:12:10: cases.dry.cases: `cases` cannot change from case to case. Write it once, at the top of the file.',
    ],
  },
  {
    name: 'case name with a control character',
    text: `${sound}cases:\n  "a\\u0007b": {}\n`,
    says: ['p.yaml:12:3: cases.a?b: the name cannot be printed. Name it with letters and digits.'],
  },
  {
    name: 'many errors at once',
    text: 'star:\n  luminosity: 0.52\n  mas: 0.85 Msun\norbit:\n  semiMajorAxis: 0.48 lightyears\n  eccentricity: 1.2\n  periapsisTime: soon\nplanet:\n  bondAlbedo: -0.3\n  heatStore: { ocean: 20 m }\nmodl: lumped\n',
    says: [
      'p.yaml:2:15: star.luminosity: `0.52` has no unit. Write e.g. `0.52 Lsun`.',
      'p.yaml:3:3: star.mas: `mas` is not a key of star. Did you mean `mass`?',
      'p.yaml:5:18: orbit.semiMajorAxis: `lightyears` is not a unit. Use `au` or `km` or `m`.',
      'p.yaml:6:17: orbit.eccentricity: `1.2` is out of bounds. Keep it at least 0 and below 1.',
      'p.yaml:7:18: orbit.periapsisTime: `soon` is not a date. Write e.g. `2026-03-04T05:00Z` or `2461103.71 TDB`.',
      'p.yaml:9:15: planet.bondAlbedo: `-0.3` is out of bounds. Keep it at least 0 and below 1.',
      'p.yaml:10:16: planet.heatStore.ocean: `ocean` is not a key of planet.heatStore. Keys here are `heatCapacity`, `mixedLayer`, `atmosphere`, `ground`.',
      'p.yaml:11:1: modl: `modl` is not a key of a scenario. Did you mean `model`?',
    ],
  },
  {
    name: 'JSON',
    text: '{"star": {"luminosity": "0.52 Lsun", "mass": "0.85 Msun"},\n "orbit": {"semiMajorAxis": 0.48, "eccentricity": 0.62},\n "planet": {"bondAlbedo": 0.3, "heatStore": {"mixedLayer": "20 m"}}}',
    says: ['p.yaml:2:29: orbit.semiMajorAxis: `0.48` has no unit. Write e.g. `0.48 au`.'],
  },
  {
    name: 'JSON trailing',
    text: '{"star": {"luminosity": "0.52 Lsun", "mass": "0.85 Msun"}\n "orbit": 3}',
    says: [
      'p.yaml:2:2: syntax: a comma, colon or space is missing. Write { key: value, key: value } or [first, second].',
    ],
  },
  {
    name: 'a misspelt mass is one error, not two',
    text: edited(['  mass:', '  mas:']),
    says: ['p.yaml:4:3: star.mas: `mas` is not a key of star. Did you mean `mass`?'],
  },
  {
    name: 'an error in the scenario is told once, though three cases have it, and though all replace the key',
    text: `${edited(['0.48 au', '0.48'], ['20 m', '20'])}cases:
  a: { planet: { heatStore: { mixedLayer: 1 m } } }
  b: { planet: { heatStore: { mixedLayer: 2 m } } }
  c: { planet: { heatStore: { mixedLayer: 3 m } } }
`,
    says: [
      'p.yaml:6:18: orbit.semiMajorAxis: `0.48` has no unit. Write e.g. `0.48 au`.',
      'p.yaml:10:28: planet.heatStore.mixedLayer: `20` has no unit. Write e.g. `20 m`.',
    ],
  },
  {
    name: 'what two of three cases lack',
    text: `${edited(['  heatStore: { mixedLayer: 20 m }\n', ''])}cases:
  a: {}
  b: { planet: { heatStore: { mixedLayer: 2 m } } }
  c: { orbit: { eccentricity: 0 } }
`,
    says: [
      'p.yaml:8:1: planet: no heat store is given (cases `a`, `c`). Write heatStore, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground.',
    ],
  },
  {
    name: 'two ways in one case',
    text: `${sound}cases:\n  a: { planet: { bondAlbedo: 0.1, albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K } } }\n`,
    says: [
      'p.yaml:12:35: cases.a.planet.albedo: `bondAlbedo` and `albedo` say the same thing in two ways. Keep one of them.',
    ],
  },
  {
    name: 'third law across star, planet and a case',
    text: `${edited(['  bondAlbedo', '  mass: 0.1 Msun\n  bondAlbedo'])}cases:\n  a: {}\n  b: { orbit: { period: 100 d, semiMajorAxis: 0.5 au } }\n`,
    says: [
      'p.yaml:14:47: cases.b.orbit.semiMajorAxis: semiMajorAxis 0.5 au and 0.41449 au (from period 100 d and star mass 0.85 Msun and planet mass 0.1 Msun) differ by 21 %; at most 1 % is allowed. Correct one of them, or leave one out.',
    ],
  },
  {
    name: 'a window name that cannot be printed, in a case',
    text: `${sound}cases:\n  a: { windows: { __proto__: 1 K to 2 K } }\n`,
    says: ['p.yaml:12:19: cases.a.windows.__proto__: the name cannot be printed. Name it with letters and digits.'],
  },
  {
    name: 'numbers that overflow together',
    text: edited(['0.52 Lsun', '1e280 Lsun'], ['0.48 au', '1e-160 m']),
    says: [
      'p.yaml:5:1: orbit.instellation: the inputs together give Infinity, which is no usable number. Use the numbers of a planet.',
    ],
  },
];

test.each(table)('broken file: $name', ({ text, says }) => {
  expect(complaints(text)).toEqual(says);
});

test('the sound file has nothing to complain of, and the table has no name twice', () => {
  expect(complaints(sound)).toEqual([]);
  expect(new Set(table.map(({ name }) => name)).size).toBe(table.length);
  expect(table.length).toBeGreaterThanOrEqual(60);
});

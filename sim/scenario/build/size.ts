/** Semi-major axis, period and total mass: any that suffice, and none that disagree. */
import { axisFromPeriod, massFromBoth, periodFromAxis } from '../../orbit/thirdLaw.ts';
import type { Quantity } from '../../quantity/index.ts';
import type { Kilograms, Metres, Seconds } from '../../si.ts';
import { agree, type Estimate } from './agree.ts';
import { type Given, relativeSigma } from './given.ts';
import { shown } from './show.ts';
import type { StarParts } from './star.ts';

export interface Size {
  readonly semiMajorAxis: Metres;
  readonly period: Seconds;
  /** Given, or what axis and period imply. */
  readonly starMass: Kilograms;
}

const keys = ['semiMajorAxis', 'period', 'scaledSemiMajorAxis', 'instellation'];

export function buildSize(given: Given, star: StarParts): Size | null {
  const period = given.quantity('orbit.period');
  const total = totalMass(given, star);
  const axes = axisEstimates(given, star, period, total);
  const chosen = axes[0];
  if (!chosen) return explainMissingAxis(given, period);
  for (const { key, estimate } of axes.slice(1)) {
    const label = 'Semi-major axis';
    agree(given, { key: `orbit.${key}`, label, unit: 'au', chosen: chosen.estimate, other: estimate });
    given.passOver(`orbit.${key}`);
  }
  const semiMajorAxis = chosen.estimate.value;
  if (chosen.key !== 'semiMajorAxis') given.derive('orbit.semiMajorAxis', semiMajorAxis, 'm', 'Semi-major axis');
  if (period) return withImpliedMass(given, star, semiMajorAxis, period.value);
  if (!total || !star.mass) return explainMissingPeriod(given);
  const value = periodFromAxis(semiMajorAxis, total.value);
  given.derive('orbit.period', value, 's', 'Orbital period');
  return { semiMajorAxis, period: value, starMass: star.mass.value };
}

function totalMass(given: Given, star: StarParts): Estimate | null {
  const planet = given.quantity('planet.mass');
  if (!star.mass) return null;
  const value = star.mass.value + (planet?.value ?? 0);
  const { mass } = star;
  const source = planet?.value ? () => `${mass.source()} and planet mass ${planet.text}` : mass.source;
  return { value, relativeSigma: (mass.relativeSigma * mass.value) / value, source };
}

interface AxisEstimate {
  readonly key: string;
  readonly estimate: Estimate;
}

/** The ways that this case gives the axis, the one to use first: period and mass, then axis, a/R*, instellation. */
function axisEstimates(given: Given, star: StarParts, period: Quantity | null, total: Estimate | null): AxisEstimate[] {
  const found: AxisEstimate[] = [];
  if (period && total) {
    found.push({
      key: 'period',
      estimate: {
        value: axisFromPeriod(period.value, total.value),
        relativeSigma: Math.hypot((2 / 3) * relativeSigma(period), total.relativeSigma / 3),
        source: () => `period ${period.text} and ${total.source()}`,
      },
    });
  }
  const axis = given.quantity('orbit.semiMajorAxis');
  if (axis) {
    const source = () => `semiMajorAxis ${axis.text}`;
    const estimate = { value: axis.value, relativeSigma: relativeSigma(axis), source, isGiven: true as const };
    found.push({ key: 'semiMajorAxis', estimate });
  }
  const scaled = scaledAxis(given, star);
  if (scaled) found.push({ key: 'scaledSemiMajorAxis', estimate: scaled });
  const lit = litAxis(given, star.luminosity);
  if (lit) found.push({ key: 'instellation', estimate: lit });
  return found;
}

function scaledAxis(given: Given, { radius, radiusKeys }: StarParts): Estimate | null {
  const scaled = given.quantity('orbit.scaledSemiMajorAxis');
  if (!scaled) return null;
  if (!radius) {
    if (given.has('star.radius')) return null;
    const what = 'a/R* gives an axis only with the radius of the star';
    return given.wrong('orbit.scaledSemiMajorAxis', what, 'Add star.radius, e.g. 0.924 Rsun');
  }
  given.use(...radiusKeys);
  return {
    value: scaled.value * radius.value,
    relativeSigma: Math.hypot(relativeSigma(scaled), radius.relativeSigma),
    source: () => `scaledSemiMajorAxis ${scaled.text} and ${radius.source()}`,
  };
}

/** F = L/(4πa²) at distance a. */
function litAxis(given: Given, luminosity: Estimate | null): Estimate | null {
  const instellation = given.quantity('orbit.instellation');
  if (!instellation || !luminosity) return null; // a missing luminosity is told where the star is built
  return {
    value: Math.sqrt(luminosity.value / (4 * Math.PI * instellation.value)),
    relativeSigma: Math.hypot(luminosity.relativeSigma, relativeSigma(instellation)) / 2,
    source: () => `instellation ${instellation.text} and ${luminosity.source()}`,
  };
}

function withImpliedMass(given: Given, star: StarParts, semiMajorAxis: Metres, period: Seconds): Size | null {
  if (star.mass) return { semiMajorAxis, period, starMass: star.mass.value };
  const planet = given.keys.planet?.mass?.value ?? 0;
  const starMass = massFromBoth(semiMajorAxis, period) - planet;
  if (!(starMass > 0)) {
    const total = shown(starMass + planet, 'Msun', 4);
    const what = `axis and period imply ${total} for star and planet together, less than the planet alone`;
    return given.wrong('planet.mass', what, 'Correct the mass, the axis or the period');
  }
  given.derive('star.mass', starMass, 'kg', 'Star mass that axis and period imply');
  return { semiMajorAxis, period, starMass };
}

function explainMissingAxis(given: Given, period: Quantity | null): null {
  if (keys.some((key) => key !== 'period' && given.has(`orbit.${key}`))) return null; // told where that key was read
  if (!period && !given.has('orbit.period')) {
    const mend = 'Write semiMajorAxis, e.g. 0.48 au; or period, scaledSemiMajorAxis or instellation';
    return given.missing('orbit', keys, 'no size is given', mend);
  }
  if (!period || given.has('star.mass') || given.has('star.density')) return null;
  return given.wrong(
    'orbit.period',
    'the period gives an axis only with the mass of the star',
    'Add star.mass, e.g. 0.85 Msun, or orbit.semiMajorAxis',
  );
}

function explainMissingPeriod(given: Given): null {
  if (given.has('star.mass') || given.has('star.density') || given.has('orbit.period')) return null;
  return given.missing(
    'orbit',
    keys,
    'the period is not known',
    'Add star.mass, e.g. 0.85 Msun, or orbit.period, e.g. 130 d',
  );
}

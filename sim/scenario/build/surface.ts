/** Albedo, emission, absorbing fraction and internal heat. */
import { zeroCelsius } from '../../constants.ts';
import type { Quantity } from '../../quantity/index.ts';
import type { Flux } from '../../si.ts';
import { constantAlbedo } from '../../surface/albedo/constant.ts';
import { rampAlbedo } from '../../surface/albedo/ramp.ts';
import { greyAtmosphere } from '../../surface/emission/greyAtmosphere.ts';
import { greyBody } from '../../surface/emission/greyBody.ts';
import { linearEmission } from '../../surface/emission/linear.ts';
import type { Albedo, Emission } from '../../world.ts';
import type { Given } from './given.ts';
import { shown } from './show.ts';

export interface Skin {
  readonly albedo: Albedo | null;
  readonly emission: Emission | null;
  readonly absorbingFraction: number | null;
  readonly internalHeat: Flux | null;
}

/** Light that falls evenly on a whole sphere: its cross-section over its surface. */
const wholeSphere = 1 / 4;

/** `asksFraction`: the model reads absorbingFraction; for others light falls on a whole sphere. */
export function buildSkin(given: Given, asksFraction: boolean): Skin {
  return {
    albedo: buildAlbedo(given),
    emission: buildEmission(given),
    absorbingFraction: asksFraction ? (given.quantity('planet.absorbingFraction')?.value ?? null) : wholeSphere,
    internalHeat: given.quantity('planet.internalHeat')?.value ?? null,
  };
}

function buildAlbedo(given: Given): Albedo | null {
  const bond = given.quantity('planet.bondAlbedo');
  if (bond) return given.attempt(() => constantAlbedo(bond.value));
  const ramp = given.keys.planet?.albedo;
  if (ramp) {
    const { warm, ice, from, to } = ramp;
    given.use('planet.albedo.warm', 'planet.albedo.ice', 'planet.albedo.from', 'planet.albedo.to');
    if (from.value > to.value) {
      const what = `\`from\` ${from.text} is above \`to\` ${to.text}`;
      return given.wrong('planet.albedo.from', what, 'All ice at `from` and below, none at `to` and above: swap them');
    }
    if (ice.value < warm.value) {
      given.warn(
        () => `The albedo of ice, ${ice.text}, is below the warm one, ${warm.text}: freezing would darken this planet.`,
      );
    }
    return given.attempt(() => rampAlbedo({ warm: warm.value, ice: ice.value, from: from.value, to: to.value }));
  }
  const mend = 'Write bondAlbedo, e.g. 0.3, or albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }';
  return given.missing('planet', ['bondAlbedo', 'albedo'], 'no albedo is given', mend);
}

function buildEmission(given: Given): Emission | null {
  const emission = given.keys.planet?.emission;
  given.use('planet.emission');
  if (!emission) {
    const emissivity = given.quantity('planet.emissivity');
    return emissivity && given.attempt(() => greyBody(emissivity.value));
  }
  const { opticalDepth, linear } = emission;
  if (opticalDepth && linear) {
    return given.wrong('planet.emission', 'opticalDepth and linear are two laws', 'Keep one of them');
  }
  if (opticalDepth) return given.attempt(() => greyAtmosphere(opticalDepth.value));
  if (linear) return buildLinear(given, linear.a, linear.b);
  return given.wrong('planet.emission', 'the emission law is empty', 'Write e.g. { opticalDepth: 0.83 }');
}

function buildLinear(given: Given, a: Quantity, b: Quantity): Emission | null {
  const atAbsoluteZero = a.value - b.value * zeroCelsius;
  if (atAbsoluteZero > 0) {
    const what = `a ${a.text} and b ${b.text} emit ${shown(atAbsoluteZero, 'W/m2')} at absolute zero`;
    return given.wrong('planet.emission.linear', what, 'Lower a or raise b; T is in °C, as the law is published');
  }
  return given.attempt(() => linearEmission({ a: a.value, b: b.value }));
}

/** Two temperatures a band, sea at 2i and land at 2i + 1: seven diagonals. */
import { addMeridionalConvergence } from '../../transport/diffusion.ts';
import type { YearMesh } from './mesh.ts';
import { bandAlbedo, type LandPhysics, leastLand, seaHeatCapacity, type ZonalPhysics } from './physics.ts';
import type { ZonalSystem } from './systemShape.ts';

const width = 3;

/** W m⁻² K⁻¹, also where land and sea are kept apart: a surface that is not there has no climate of its own to add. */
const followingExchange = 1;

export function landAndSea(physics: ZonalPhysics, land: LandPhysics, mesh: YearMesh): ZonalSystem {
  const { bands, conductance, warm, iceAlbedo, warmAlbedo, world } = physics;
  const { emission, internalHeat } = world.surface;
  const count = bands.count;
  const row = () => new Float64Array(count);
  const mean = row();
  const convergence = row();
  const surfaces = [0, 1].map((which) => ({
    which,
    share: which === 0 ? land.fraction.map((f) => 1 - f) : land.fraction,
    temperature: row(),
    warm: row(),
    below: row(),
    here: row(),
    above: row(),
    flux: row(),
  }));
  type Surface = (typeof surfaces)[number];
  const varyingCapacity = physics.heatCapacity - physics.frozenHeatCapacity;
  const capacityOf = (surface: Surface, i: number) =>
    surface.which === 0 ? seaHeatCapacity(physics, surface.temperature[i]) : land.heatCapacity;
  /**
   * ν/f of a surface. One that fills no part of a band only follows the other; one that fills all of it exchanges with none.
   */
  const exchangeOf = (surface: Surface, i: number) => {
    const f = surface.share[i];
    if (f === 1) return 0;
    return f === 0 ? Math.max(land.exchange, followingExchange) / leastLand : land.exchange / f;
  };

  function split(y: Float64Array): void {
    for (const { which, temperature } of surfaces) for (let i = 0; i < count; i++) temperature[i] = y[2 * i + which];
  }

  function fluxInto(offset: number): void {
    const [sea, ground] = surfaces;
    for (let i = 0; i < count; i++) {
      mean[i] = sea.share[i] * sea.temperature[i] + ground.share[i] * ground.temperature[i];
    }
    convergence.fill(0);
    addMeridionalConvergence(mean, conductance, convergence);
    for (const surface of surfaces) {
      const other = surfaces[1 - surface.which];
      for (let i = 0; i < count; i++) {
        const t = surface.temperature[i];
        const absorbed = mesh.insolation[offset + i] * (1 - bandAlbedo(physics, i, surface.warm[i]));
        const exchanged = exchangeOf(surface, i) * (other.temperature[i] - t);
        surface.flux[i] = absorbed + internalHeat - emission.at(t) + convergence[i] + exchanged;
      }
    }
  }

  function jacobian(frozen: boolean): ZonalSystem['jacobianInto'] {
    return (step, y, { diagonals }) => {
      const offset = step * 5 * count;
      split(y);
      for (const s of surfaces) warm.slopesInto(s.temperature, s.warm, s.below, s.here, s.above);
      fluxInto(offset);
      for (const diagonal of diagonals) diagonal.fill(0);
      for (const surface of surfaces) {
        const { which } = surface;
        const other = surfaces[1 - which];
        const toOther = which === 0 ? 1 : -1;
        for (let i = 0; i < count; i++) {
          const r = 2 * i + which;
          const capacity = capacityOf(surface, i);
          const exchange = exchangeOf(surface, i);
          const fromBelow = i > 0 ? conductance[i - 1] : 0;
          const fromAbove = i < count - 1 ? conductance[i] : 0;
          const leaves = fromBelow + fromAbove;
          const response = frozen ? 0 : mesh.insolation[offset + i] * (iceAlbedo - warmAlbedo[i]);
          const stores =
            which === 0 && varyingCapacity !== 0
              ? (surface.flux[i] * varyingCapacity * physics.rampWeight.slopeAt(y[r])) / capacity
              : 0;
          const add = (column: number, value: number): void => {
            diagonals[width + column][r] += value / capacity;
          };
          add(0, -emission.slopeAt(y[r]) - stores + response * surface.here[i] - exchange - leaves * surface.share[i]);
          add(toOther, exchange - leaves * other.share[i]);
          if (i > 0) {
            add(-2, fromBelow * surface.share[i - 1] + response * surface.below[i]);
            add(-2 + toOther, fromBelow * other.share[i - 1]);
          }
          if (i < count - 1) {
            add(2, fromAbove * surface.share[i + 1] + response * surface.above[i]);
            add(2 + toOther, fromAbove * other.share[i + 1]);
          }
        }
      }
    };
  }

  function rateInto(step: number, stage: number, y: Float64Array, rate: Float64Array): void {
    split(y);
    for (const s of surfaces) warm.into(s.temperature, s.warm);
    fluxInto((step * 5 + Math.min(stage, 4)) * count);
    for (const s of surfaces) for (let i = 0; i < count; i++) rate[2 * i + s.which] = s.flux[i] / capacityOf(s, i);
  }

  /** From the temperatures and shares of `surfaces`. */
  function drift(step: number, into: Float64Array): void {
    for (const s of surfaces) {
      for (let i = 0; i < count; i++) {
        const absorbed = mesh.insolationDrift[step * count + i] * (1 - bandAlbedo(physics, i, s.warm[i]));
        into[2 * i + s.which] = absorbed / capacityOf(s, i);
      }
    }
  }

  const jacobianInto = jacobian(false);
  return {
    size: 2 * count,
    width,
    mesh,
    physics,
    rateInto,
    lineariseInto(step, y, f, matrix, driftOfStep) {
      rateInto(step, 0, y, f);
      drift(step, driftOfStep);
      jacobianInto(step, y, matrix);
    },
    jacobianInto,
    frozenJacobianInto: jacobian(true),
    transportRatesInto(y, into) {
      split(y);
      for (const s of surfaces) {
        for (let i = 0; i < count; i++) {
          const leaves = (conductance[i - 1] ?? 0) + (conductance[i] ?? 0);
          into[2 * i + s.which] = (leaves * s.share[i]) / capacityOf(s, i);
        }
      }
    },
    driftInto(step, y, into) {
      split(y);
      for (const s of surfaces) warm.into(s.temperature, s.warm);
      drift(step, into);
    },
  };
}

/** A settled zonal year as people look at it: rows of temperature, insolation, albedo and fluxes at any time. */
import type { Seconds } from '../../si.ts';
import { addMeridionalConvergence } from '../../transport/diffusion.ts';
import type { Globe, World } from '../../world.ts';
import { globalMean } from './bands.ts';
import { bandInsolation } from './insolation.ts';
import { bandAlbedo, seaHeatCapacity, type ZonalPhysics } from './physics.ts';
import type { ZonalState } from './states.ts';
import { type YearCurves, yearCurves } from './yearCurves.ts';

/** One moment; arrays by band, overwritten by the next call. Without qualification: means over a band's surfaces. */
export interface Moment {
  readonly temperature: Float64Array;
  readonly seaTemperature: Float64Array;
  readonly landTemperature: Float64Array;
  readonly insolation: Float64Array;
  readonly albedo: Float64Array;
  readonly absorbed: Float64Array;
  readonly emitted: Float64Array;
  /** Heat that transport brings, W m⁻². */
  readonly convergence: Float64Array;
  /** 0 all ice, 1 ice-free. */
  readonly warmShare: Float64Array;
}

export interface ZonalYear {
  readonly world: World;
  readonly globe: Globe;
  readonly physics: ZonalPhysics;
  readonly curves: YearCurves;
  at(time: Seconds): Moment;
  /** W m⁻² by band. */
  insolationInto(time: Seconds, into: Float64Array): void;
  /** Heat that the year has left in store, J m⁻², area mean: zero but for what the solver leaves. */
  storedOverYear(): number;
}

export function zonalYear(world: World, globe: Globe, state: ZonalState): ZonalYear {
  const { physics } = state.system;
  const count = physics.bands.count;
  const { emission } = world.surface;
  const curves = yearCurves(state.system, state.history);
  const insolationAt = bandInsolation(world, globe, physics.bands);
  const row = () => new Float64Array(count);
  const moment: Moment = {
    temperature: row(),
    seaTemperature: row(),
    landTemperature: row(),
    insolation: row(),
    albedo: row(),
    absorbed: row(),
    emitted: row(),
    convergence: row(),
    warmShare: row(),
  };
  const share = row();
  const unknowns = new Float64Array(state.system.size);
  const landShare = physics.land?.fraction ?? row();
  const seaShare = landShare.map((f) => 1 - f);

  /** Adds one surface's part to the band means. */
  function addSurface(temperature: Float64Array, weight: Float64Array): void {
    physics.warm.into(temperature, share);
    for (let i = 0; i < count; i++) {
      const f = weight[i];
      moment.temperature[i] += f * temperature[i];
      moment.warmShare[i] += f * share[i];
      moment.albedo[i] += f * bandAlbedo(physics, i, share[i]);
      moment.emitted[i] += f * emission.at(temperature[i]);
    }
  }

  return {
    world,
    globe,
    physics,
    curves,
    at(time) {
      insolationAt.at(time, moment.insolation);
      for (const part of ['temperature', 'warmShare', 'albedo', 'emitted', 'convergence'] as const)
        moment[part].fill(0);
      curves.unknownsInto(time, unknowns);
      const surfaces = curves.land === null ? 1 : 2;
      for (let i = 0; i < count; i++) moment.seaTemperature[i] = unknowns[surfaces * i];
      addSurface(moment.seaTemperature, seaShare);
      if (curves.land !== null) {
        for (let i = 0; i < count; i++) moment.landTemperature[i] = unknowns[2 * i + 1];
        addSurface(moment.landTemperature, landShare);
      }
      for (let i = 0; i < count; i++) moment.absorbed[i] = moment.insolation[i] * (1 - moment.albedo[i]);
      addMeridionalConvergence(moment.temperature, physics.conductance, moment.convergence);
      return moment;
    },
    insolationInto: insolationAt.at,
    storedOverYear() {
      const change = (curve: YearCurves['sea'][number]) => curve.value[curve.value.length - 1] - curve.value[0];
      return globalMean(
        Float64Array.from(curves.sea, (curve, i) => {
          const f = landShare[i];
          const sea = (1 - f) * seaHeatCapacity(physics, curve.value[0]) * change(curve);
          return sea + (curves.land === null ? 0 : f * physics.land!.heatCapacity * change(curves.land[i]));
        }),
      );
    },
  };
}

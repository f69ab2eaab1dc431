/** The forms of heatStore → one heat capacity. */
import { gravitationalConstant } from '../../constants.ts';
import type { ArealHeatCapacity } from '../../si.ts';
import { atmosphereHeatCapacity } from '../../surface/heatStore/atmosphere.ts';
import { mixedLayerHeatCapacity } from '../../surface/heatStore/mixedLayer.ts';
import { alternatives } from '../merge.ts';
import type { HeatStoreKeys } from '../schema/heatStore.ts';
import type { Given } from './given.ts';
import { type GroundSetting, groundCapacity } from './ground.ts';
import { shown } from './show.ts';

const forms = alternatives
  .find(({ section }) => section === 'planet.heatStore')!
  .ways.flat() as (keyof HeatStoreKeys)[];
const oneForm = 'Write one of heatCapacity, mixedLayer, atmosphere, ground';

/** A key that holds heat stores, and what they are called. */
export type StoreKey = 'heatStore' | 'landHeatStore' | 'frozenHeatStore';

const namesOf = {
  heatStore: { missing: 'no heat store is given', capacity: 'heatCapacity', label: 'Heat capacity' },
  landHeatStore: {
    missing: 'no heat store of land is given',
    capacity: 'landHeatCapacity',
    label: 'Heat capacity of land',
  },
  frozenHeatStore: {
    missing: 'no heat store of frozen sea is given',
    capacity: 'frozenHeatCapacity',
    label: 'Heat capacity of frozen sea',
  },
} as const;

/** Total heat capacity; null when it cannot be had. `setting` is null while the orbit is not known. */
export function buildHeatStore(
  given: Given,
  setting: GroundSetting | null,
  name: StoreKey = 'heatStore',
): ArealHeatCapacity | null {
  given.use(`planet.${name}`);
  const store = given.keys.planet?.[name];
  const { missing, capacity: derivedKey, label } = namesOf[name];
  if (!store) {
    const mend = `Write ${name}, e.g. { mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }, or an atmosphere or ground`;
    return given.missing('planet', [name], missing, mend);
  }
  const stores = Array.isArray(store) ? store : [store];
  const capacities = stores.map((one, index) => {
    const key = Array.isArray(store) ? `planet.${name}.${index}` : `planet.${name}`;
    const capacity = oneCapacity(given, key, one, setting);
    if (capacity !== null && stores.length > 1) {
      given.derive(`${key}.heatCapacity`, capacity, 'J/m2/K', `Heat capacity of ${formOf(one)}`);
    }
    return capacity;
  });
  if (capacities.some((capacity) => capacity === null)) return null;
  const total = capacities.reduce<number>((sum, capacity) => sum + capacity!, 0);
  given.derive(`planet.${derivedKey}`, total, 'J/m2/K', label);
  return total;
}

function formOf(store: HeatStoreKeys): keyof HeatStoreKeys | undefined {
  return forms.find((form) => store[form] !== undefined);
}

function oneCapacity(
  given: Given,
  key: string,
  store: HeatStoreKeys,
  setting: GroundSetting | null,
): ArealHeatCapacity | null {
  const present = forms.filter((form) => store[form] !== undefined);
  if (present.length === 0) return given.wrong(key, 'the heat store is empty', oneForm);
  if (present.length > 1) {
    const what = `${present.join(' and ')} stand in one heat store`;
    return given.wrong(
      key,
      what,
      `Keep one, or write a list that adds up: [{ ${present[0]}: … }, { ${present[1]}: … }]`,
    );
  }
  if (store.heatCapacity) return store.heatCapacity.value;
  if (store.mixedLayer) return mixedLayerHeatCapacity(store.mixedLayer.value);
  if (store.atmosphere) return airCapacity(given, key, store.atmosphere);
  return groundCapacity(given, key, store.ground!, setting);
}

function airCapacity(
  given: Given,
  key: string,
  air: NonNullable<HeatStoreKeys['atmosphere']>,
): ArealHeatCapacity | null {
  const own = surfaceGravity(given);
  const { gravity: written } = air;
  const gravity = written?.value ?? own;
  if (gravity === null) {
    const what = 'no gravity is given';
    return given.wrong(`${key}.atmosphere`, what, 'Add gravity, e.g. 11 m/s2, or planet.mass and planet.radius');
  }
  if (!written) given.use('planet.mass', 'planet.radius');
  else if (own !== null && Math.abs(own / gravity - 1) > 0.01) {
    given.warn(
      () =>
        `${key}.atmosphere.gravity ${written.text} is used; mass and radius of the planet give ${shown(own, 'm/s2', 3)}.`,
    );
  }
  return atmosphereHeatCapacity({
    surfacePressure: air.surfacePressure.value,
    specificHeat: air.specificHeat.value,
    gravity,
  });
}

/** From the planet's mass and radius; null unless both are given. */
export function surfaceGravity(given: Given): number | null {
  const { mass, radius } = given.keys.planet ?? {};
  return mass && radius && mass.value > 0 ? (gravitationalConstant * mass.value) / radius.value ** 2 : null;
}

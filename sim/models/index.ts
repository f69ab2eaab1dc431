/** The models by the name that `model:` gives in a scenario. A new one is a folder and a line here. */
import { lumpedModel } from './lumped/index.ts';
import type { Model } from './model.ts';
import { zonalModel } from './zonal/index.ts';

export const models: Readonly<Record<string, Model>> = { lumped: lumpedModel(), zonal: zonalModel() };

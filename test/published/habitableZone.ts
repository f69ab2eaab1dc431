/**
 * Kopparapu et al. (2014) ApJ 787, L29, table 1: coefficients seen, quoted in many public sources. (One public copy prints
 * −2.048e−15 for the last coefficient of the 5-Earth-mass row; five others print −2.084e−15, as here.)
 * `flux` is S_eff at six star temperatures, `axis` the distance in au for S₀ = 1 at 1 au and T = 5780 K: calculated, 7 digits.
 */
export const fluxTemperatures = [2600, 3000, 4000, 5000, 6500, 7200] as const;

// biome-ignore format: a table
export const habitableRows = [
  { limit: 'recentVenus', solar: 1.776, axis: 0.75037528, flux: [1.4645349, 1.4791538, 1.520079, 1.6299774, 1.9371191, 2.0796564] },
  { limit: 'runawayGreenhouse', solar: 1.107, axis: 0.95044325, flux: [0.91289858, 0.92197461, 0.94743494, 1.0159445, 1.2074748, 1.2963637] },
  { limit: 'runawayGreenhouse5Earths', solar: 1.188, axis: 0.9174698, flux: [0.98020136, 0.98975334, 1.0166671, 1.0900958, 1.2961177, 1.3917547] },
  { limit: 'runawayGreenhouseTenthEarth', solar: 0.99, axis: 1.0050378, flux: [0.81088746, 0.81946576, 0.84392162, 0.90712609, 1.0810972, 1.1617836] },
  { limit: 'maximumGreenhouse', solar: 0.356, axis: 1.6760038, flux: [0.22276222, 0.23297945, 0.26397546, 0.31021052, 0.39996797, 0.43562853] },
  { limit: 'earlyMars', solar: 0.32, axis: 1.767767, flux: [0.20021458, 0.20940491, 0.2372766, 0.2788402, 0.3595221, 0.39157793] },
] as const;

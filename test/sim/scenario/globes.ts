/** A scenario of the zonal model without fault, and ways to spoil it. */

export const soundGlobe = `model: zonal
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.7 au, eccentricity: 0.2 }
planet:
  albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }
  heatStore: { mixedLayer: 20 m }
  heatTransport: 0.65 W/m2/K
  obliquity: 23 deg
  rotationPeriod: 26 h
  solarLongitudeOfPeriapsis: 250 deg
`;

/** The sound scenario with pieces of its text replaced, and lines added to the planet. */
export function globe(edits: Readonly<Record<string, string>>, ...lines: readonly string[]): string {
  const edited = Object.entries(edits).reduce((text, [old, replacement]) => {
    if (!text.includes(old)) throw new Error(`not in the sound scenario: ${old}`);
    return text.replace(old, () => replacement);
  }, soundGlobe);
  return edited + lines.map((line) => `${line}\n`).join('');
}

/** Every key that only models with latitude read. */
export const richGlobe = globe(
  { '273 K }': '273 K, p2: 0.08 }', '23 deg': 'isotropic', '0.65 W/m2/K': '0.2 to 2 W/m2/K log' },
  '  bands: 45',
  '  insolation: { legendre: [1, 0, -0.482] }',
  '  frozenHeatStore: { mixedLayer: 2 m }',
  '  landFraction: { latitudes: [-90 deg, 0 deg, 90 deg], values: [0.1, 0.2, 0.6] }',
  '  landHeatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } }',
  '  landSeaExchange: 1 ± 0.2 W/m2/K',
  'cases:',
  '  daily: { planet: { insolation: daily, landFraction: 0.3 } }',
  "  turned: { planet: { obliquity: 120 deg, rotationPeriod: '3:2', frozenHeatStore: null } }",
  '  one: { model: lumped, solve: { start: { temperature: 250 K, orbits: 2 } } }',
);

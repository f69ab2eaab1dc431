/** Lengths of seasons, and the Martian calendar. */

/**
 * Northern spring, summer, autumn and winter. Allison & McEwen (2000) Planet. Space Sci. 48, 215 (seen).
 * Mars, sols: their perturbing terms move Ls by up to 0.026° in all, 0.05 sol at 0.524° a day; two ends make 0.1.
 * The Earth, days: the longitude of perihelion moves by 0.017° a year and the lengths with it by up to 0.0005 d, and the table
 * does not say its year: 0.01 d is 20 years. Elements of J2000 (Simon et al. 1994, A&A 282, 663, from memory).
 */
export const seasonLengthCases = [
  {
    planet: 'Mars',
    eccentricity: 0.0934,
    solarLongitudeOfPeriapsisDeg: 250.99,
    year: 668.5921,
    expected: [193.3, 178.64, 142.7, 153.95],
    within: 0.1,
  },
  {
    planet: 'the Earth',
    eccentricity: 0.0167086,
    solarLongitudeOfPeriapsisDeg: 282.937,
    year: 365.2422,
    expected: [92.764, 93.647, 89.836, 88.997],
    within: 0.01,
  },
] as const;

/** Sols since Ls = 0 at Ls = 30, 60 … 360°: published calendar of Mars (seen), one decimal. */
export const marsCalendar = {
  eccentricity: 0.0934,
  solarLongitudeOfPeriapsisDeg: 250.99,
  yearSols: 668.6,
  sols: [61.2, 126.6, 193.3, 257.8, 317.5, 371.9, 421.6, 468.5, 514.6, 562.0, 612.9, 668.6],
} as const;

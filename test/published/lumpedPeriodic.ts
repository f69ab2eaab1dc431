/**
 * Nonlinear periodic lumped temperature on a Kepler orbit: 4K du/dM = (a/r)² − u⁴, u = T/T₀, K = nC/(4εσT₀³), M from periapsis.
 * Own calculation with a general-purpose integrator at rtol 1e-12 (Python), printed to seven digits: `calculated`, there being no
 * published table. Tolerances that follow from the printing and the integrator: 2e-6 in u, 0.01° in M.
 */
// biome-ignore format: a table
export const lumpedPeriodic = [
  { e: 0.0167, k: 0.01, mean: 0.9999826, max: 1.0084556, maxAtDeg: 0.5586478, min: 0.9917536, minAtDeg: -179.4126507 },
  { e: 0.0167, k: 0.1, mean: 0.9999831, max: 1.0084143, maxAtDeg: 5.5692659, min: 0.9917942, minAtDeg: -174.1469413 },
  { e: 0.0167, k: Math.SQRT1_2, mean: 1.0, max: 1.0069042, maxAtDeg: 34.5288704, min: 0.9932663, minAtDeg: -143.9979983 },
  { e: 0.0167, k: 1.0, mean: 1.0000087, max: 1.0059786, maxAtDeg: 44.1211232, min: 0.9941679, minAtDeg: -134.1197649 },
  { e: 0.0167, k: 10.0, mean: 1.0000343, max: 1.0008666, maxAtDeg: 83.0986522, min: 0.9992046, minAtDeg: -94.5198974 },
  { e: 0.0167, k: 100.0, mean: 1.0000349, max: 1.0001184, maxAtDeg: 88.2310471, min: 0.9999514, minAtDeg: -89.3769298 },
  { e: 0.1, k: 0.01, mean: 0.9993737, max: 1.0540899, maxAtDeg: 0.4891898, min: 0.953465, minAtDeg: -179.3390148 },
  { e: 0.1, k: 0.1, mean: 0.9993921, max: 1.0538305, maxAtDeg: 4.8817031, min: 0.9536988, minAtDeg: -173.4196773 },
  { e: 0.1, k: Math.SQRT1_2, mean: 0.9999996, max: 1.0441622, maxAtDeg: 30.8934421, min: 0.9619944, minAtDeg: -140.2894598 },
  { e: 0.1, k: 1.0, mean: 1.0003131, max: 1.0382216, maxAtDeg: 39.7593055, min: 0.9670672, minAtDeg: -129.7104515 },
  { e: 0.1, k: 10.0, mean: 1.0012383, max: 1.0062912, maxAtDeg: 77.1547578, min: 0.9962792, minAtDeg: -88.5781317 },
  { e: 0.1, k: 100.0, mean: 1.0012569, max: 1.0017604, maxAtDeg: 82.2615436, min: 1.0007543, minAtDeg: -83.4076597 },
  { e: 0.2056, k: 0.01, mean: 0.9973322, max: 1.121962, maxAtDeg: 0.4056749, min: 0.910753, minAtDeg: -179.2415938 },
  { e: 0.2056, k: 0.1, mean: 0.9974102, max: 1.1213932, maxAtDeg: 4.0534611, min: 0.9112113, minAtDeg: -172.4592559 },
  { e: 0.2056, k: Math.SQRT1_2, mean: 0.999992, max: 1.0995812, maxAtDeg: 26.3745722, min: 0.9270863, minAtDeg: -135.5254517 },
  { e: 0.2056, k: 1.0, mean: 1.0013318, max: 1.0861219, maxAtDeg: 34.290901, min: 0.9367826, minAtDeg: -124.0822656 },
  { e: 0.2056, k: 10.0, mean: 1.0053315, max: 1.0160403, maxAtDeg: 69.5938682, min: 0.9950324, minAtDeg: -81.02451 },
  { e: 0.2056, k: 100.0, mean: 1.0054126, max: 1.0064703, maxAtDeg: 74.6690557, min: 1.0043591, minAtDeg: -75.8159691 },
  { e: 0.5, k: 0.01, mean: 0.9833475, max: 1.4141959, maxAtDeg: 0.2025771, min: 0.8165068, minAtDeg: -178.9475102 },
  { e: 0.5, k: 0.1, mean: 0.9838189, max: 1.4124428, maxAtDeg: 2.0314358, min: 0.8175007, minAtDeg: -169.5711948 },
  { e: 0.5, k: Math.SQRT1_2, mean: 0.999675, max: 1.3385937, maxAtDeg: 14.4907621, min: 0.8498555, minAtDeg: -121.9644206 },
  { e: 0.5, k: 1.0, mean: 1.0082123, max: 1.2920514, maxAtDeg: 19.5685644, min: 0.8696149, minAtDeg: -108.243483 },
  { e: 0.5, k: 10.0, mean: 1.0359949, max: 1.0672158, maxAtDeg: 48.0954488, min: 1.0078751, minAtDeg: -59.5819775 },
  { e: 0.5, k: 100.0, mean: 1.0366084, max: 1.039606, maxAtDeg: 53.076881, min: 1.0336421, minAtDeg: -54.2299368 },
  { e: 0.7, k: 0.01, mean: 0.9648082, max: 1.8257099, maxAtDeg: 0.0941517, min: 0.7669784, minAtDeg: -178.7301759 },
  { e: 0.7, k: 0.1, mean: 0.9657607, max: 1.8225294, maxAtDeg: 0.9465043, min: 0.768281, minAtDeg: -167.4466728 },
  { e: 0.7, k: Math.SQRT1_2, mean: 0.9984549, max: 1.6766652, maxAtDeg: 7.3343364, min: 0.8090218, minAtDeg: -112.6015023 },
  { e: 0.7, k: 1.0, mean: 1.016943, max: 1.5821384, maxAtDeg: 10.3122976, min: 0.8339151, minAtDeg: -97.4477616 },
  { e: 0.7, k: 10.0, mean: 1.0860268, max: 1.1430147, maxAtDeg: 32.6321571, min: 1.0379877, minAtDeg: -44.2129828 },
  { e: 0.7, k: 100.0, mean: 1.0877936, max: 1.0931177, maxAtDeg: 37.5220681, min: 1.0825602, minAtDeg: -38.6855314 },
] as const;

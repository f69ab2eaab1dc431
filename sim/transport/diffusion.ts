/**
 * Diffusion of heat between equal-area bands, x = sin(latitude): ∂/∂x[D(1 − x²) ∂T/∂x] on cells of width Δx = 2/N, second order.
 * Source: North (1975) J. Atmos. Sci. 32, 1301; North, Cahalan & Coakley (1981) Rev. Geophys. 19, 91.
 */

/**
 * Conductance between band i and band i + 1, per unit area of a band: D(1 − x²)/Δx² at their common edge.
 * Units: heatTransport W m⁻² K⁻¹ → W m⁻² K⁻¹ (bands − 1,).
 */
export function meridionalConductance(heatTransport: number, bands: number): Float64Array {
  const width = 2 / bands;
  return Float64Array.from({ length: bands - 1 }, (_, i) => {
    const edge = -1 + (i + 1) * width;
    return (heatTransport * (1 - edge * edge)) / (width * width);
  });
}

/** Adds the convergence of heat, W m⁻²: temperature K (bands,), conductance (bands − 1,), flux (bands,). Sums to zero over the globe. */
export function addMeridionalConvergence(
  temperature: Float64Array,
  conductance: Float64Array,
  flux: Float64Array,
): void {
  const north = flux.length - 1;
  let inflow = 0; // nothing crosses the south pole
  for (let band = 0; band < north; band++) {
    const outflow = conductance[band] * (temperature[band] - temperature[band + 1]);
    flux[band] += inflow - outflow;
    inflow = outflow; // what leaves this band enters the next: heat is conserved by construction
  }
  flux[north] += inflow;
}

/** Plotly, which the page carries as a script of its own behind this code: there once the document has been read. */
import type * as Plotly from 'plotly.js-dist-min';

export function plotly(): typeof Plotly {
  return (globalThis as unknown as { Plotly: typeof Plotly }).Plotly;
}

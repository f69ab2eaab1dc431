/** What all charts have in common: font, paper, axes. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';

const figureFont = 'system-ui, -apple-system, "Segoe UI", Roboto, "Noto Sans", "Liberation Sans", sans-serif';

export function plainLayout({ theme, narrow }: FigureStyle): Partial<Layout> {
  return {
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    font: { family: figureFont, size: narrow ? 12 : 13, color: theme.ink },
    showlegend: false,
    hoverlabel: { bgcolor: theme.paper, bordercolor: theme.quiet, font: { color: theme.ink }, namelength: -1 },
  };
}

export function axisStyle({ theme }: FigureStyle): Partial<Layout['xaxis']> {
  return {
    linecolor: theme.quiet,
    showline: true,
    ticks: 'outside',
    ticklen: 5,
    tickcolor: theme.quiet,
    tickfont: { color: theme.quiet },
    zeroline: false,
  };
}

/** Where the pointer is over a drawn figure, in its data: as Plotly tells of the point that it names. */

interface Hovered {
  readonly points?: readonly { readonly x?: unknown; readonly y?: unknown }[];
}

interface Emitter {
  on(event: 'plotly_hover', heard: (event: Hovered) => void): void;
  on(event: 'plotly_unhover', heard: () => void): void;
}

/** Null when it has left. */
export function watchPointer(plot: HTMLElement, pointed: (x: number | null, y: number) => void): void {
  const emitter = plot as unknown as Emitter;
  emitter.on('plotly_hover', ({ points }) => {
    const { x, y } = points?.[0] ?? {};
    if (typeof x === 'number' && typeof y === 'number') pointed(x, y);
  });
  emitter.on('plotly_unhover', () => pointed(null, 0));
}

/** A colour that lets what lies below show through: `#rrggbb` and an opacity of 0 … 1. */
export function translucent(colour: string, opacity: number): string {
  const channels = [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16));
  return `rgba(${channels.join(', ')}, ${opacity})`;
}

/** Cosines and sines of the uniform mesh on [0, 2π), kept once per size: every solve on a circle shares them. */
export interface Circle {
  readonly cosines: Float64Array;
  readonly sines: Float64Array;
}

export function circleCache(): (size: number) => Circle {
  const kept = new Map<number, Circle>();
  return (size) => {
    let circle = kept.get(size);
    if (circle === undefined) {
      const cosines = new Float64Array(size);
      const sines = new Float64Array(size);
      for (let i = 0; i < size; i++) {
        cosines[i] = Math.cos((2 * Math.PI * i) / size);
        sines[i] = Math.sin((2 * Math.PI * i) / size);
      }
      circle = { cosines, sines };
      kept.set(size, circle);
    }
    return circle;
  };
}

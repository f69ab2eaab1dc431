/**
 * First and second derivatives of a smooth periodic function from its values on a uniform mesh of at least six: seven-point
 * central differences, sixth order (Fornberg 1988, Math. Comp. 51, 699, table 1). For stiff solutions, whose slopes taken
 * from y′ = f would amplify every error of y by ∂f/∂y.
 */
export function circleDifferencesInto(
  value: Float64Array,
  size: number,
  slope: Float64Array,
  curvature: Float64Array,
): void {
  const h = (2 * Math.PI) / size;
  const first = 1 / (60 * h);
  const second = 1 / (180 * h * h);
  // A window of seven values slides round the circle.
  let left3 = value[size - 3];
  let left2 = value[size - 2];
  let left1 = value[size - 1];
  let centre = value[0];
  let right1 = value[1];
  let right2 = value[2];
  let next = 3;
  for (let i = 0; i < size; i++) {
    const right3 = value[next];
    next = next + 1 === size ? 0 : next + 1;
    slope[i] = first * (45 * (right1 - left1) - 9 * (right2 - left2) + (right3 - left3));
    curvature[i] = second * (2 * (right3 + left3) - 27 * (right2 + left2) + 270 * (right1 + left1) - 490 * centre);
    left3 = left2;
    left2 = left1;
    left1 = centre;
    centre = right1;
    right1 = right2;
    right2 = right3;
  }
}

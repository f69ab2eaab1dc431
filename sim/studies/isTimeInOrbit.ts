/** Is a finding of this name a time after periapsis, which comes round with the orbit? */
export function isTimeInOrbit(name: string): boolean {
  return /^timeOf|^(hottest|coldest)Time$/.test(name);
}

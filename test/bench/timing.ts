/** CPU time of small pieces of work: medians, since machines are shared. */
export function medianMicroseconds(work: () => void, repeats: number, rounds = 9): number {
  for (let i = 0; i < repeats; i++) work();
  const times: number[] = [];
  for (let round = 0; round < rounds; round++) {
    const began = process.cpuUsage();
    for (let i = 0; i < repeats; i++) work();
    const spent = process.cpuUsage(began);
    times.push((spent.user + spent.system) / repeats);
  }
  return median(times);
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[sorted.length >> 1];
}

export function geometricMean(values: readonly number[]): number {
  return Math.exp(values.reduce((sum, value) => sum + Math.log(value), 0) / values.length);
}

import { SimError } from '../../error.ts';

/** Throws SimError unless 0 ≤ albedo < 1: at 1 nothing is absorbed and no temperature follows. */
export function requireAlbedo(where: string, albedo: number): void {
  if (!(albedo >= 0 && albedo < 1)) {
    throw new SimError(where, `${albedo} is not an albedo`, 'Use 0 ≤ albedo < 1');
  }
}

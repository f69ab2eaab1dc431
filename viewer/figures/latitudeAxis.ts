/**
 * The latitude axis: equal areas take equal lengths (the axis runs in the sine of latitude), with ticks in degrees.
 *
 * Why not even degrees: a reader judges a map by its areas. Here the part of the map inside a contour is the share of the
 * planet's surface and of its time, the very number that the findings give; in even degrees the caps beyond 60° would fill a
 * third of the map with 13 % of the surface. The bands of equal area are equally tall, so the resolution shows as it is.
 */
import { radiansPerDegree } from '../../sim/constants.ts';
import { type LatitudeDeg, wholeLatitudeText } from '../words/latitude.ts';
import { multiples, roomyTicks } from './roomyTicks.ts';

/** Sine of the latitude: −1 at the south pole, 1 at the north pole. */
export type LatitudePlace = number;

export const poleToPole: readonly [LatitudePlace, LatitudePlace] = [-1, 1];

export function latitudePlace(latitudeDeg: LatitudeDeg): LatitudePlace {
  return Math.sin(latitudeDeg * radiansPerDegree);
}

/** Steps between ticks, the most welcome first; the equator and the poles come before all. */
const steps = [30, 15, 5, 1];

/** Ticks for the part in view; `pixels` is its length on the page, `room` what a tick needs of it. */
export function latitudeTicks(
  [from, to]: readonly [LatitudePlace, LatitudePlace],
  pixels: number,
  room: number,
): { tickmode: 'array'; tickvals: number[]; ticktext: string[] } {
  const ticks = roomyTicks({
    levels: [[0, 90, -90], ...steps.map((step) => outwards(multiples(step, -90, 90)))],
    place: (latitudeDeg) => within(latitudePlace(latitudeDeg), from, to),
    gap: (room / pixels) * (to - from),
    enough: 5,
  });
  return {
    tickmode: 'array',
    tickvals: ticks.map(({ place }) => place),
    ticktext: ticks.map(({ value }) => wholeLatitudeText(value)),
  };
}

/** From the equator to the poles, north and south alike. */
function outwards(latitudes: readonly number[]): number[] {
  return latitudes.toSorted((a, b) => Math.abs(a) - Math.abs(b) || b - a);
}

function within(place: number, from: number, to: number): number | null {
  return place >= from - 1e-9 && place <= to + 1e-9 ? place : null;
}

import { meridianOf } from '../flight/earth.ts';
import { fromDegrees, metres } from '../units.ts';
import { NEAR_KM } from './limits.ts';

export interface Position {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/** Cubes each way: the Earth's width in kilometres with room. */
const SPAN = 16_384;

/**
 * Finds sites nearer than 1 km to a place without comparing each with each: places are kept in cubes of 1 km edge
 * about the Earth's centre, which have no seams at the date line or the poles. The chord stands for the distance
 * along the ground; over 1 km the two differ by a micrometre. Elevation is left out.
 */
export class NearIndex<T extends Position> {
  readonly #cubes = new Map<number, { place: T; at: readonly [number, number, number] }[]>();

  add(place: T): void {
    const at = toCartesianKm(place);
    const key = keyOf(Math.floor(at[0]), Math.floor(at[1]), Math.floor(at[2]));
    const cube = this.#cubes.get(key);
    if (cube === undefined) this.#cubes.set(key, [{ place, at }]);
    else cube.push({ place, at });
  }

  /** The first place within 1 km of this one for which `counts` holds, with its distance in kilometres. */
  find(position: Position, counts: (place: T) => boolean): { place: T; distanceKm: number } | undefined {
    const at = toCartesianKm(position);
    const [x, y, z] = at.map(Math.floor) as [number, number, number];
    for (let dx = -1; dx <= 1; dx += 1) {
      for (let dy = -1; dy <= 1; dy += 1) {
        for (let dz = -1; dz <= 1; dz += 1) {
          for (const other of this.#cubes.get(keyOf(x + dx, y + dy, z + dz)) ?? []) {
            const distanceKm = Math.hypot(at[0] - other.at[0], at[1] - other.at[1], at[2] - other.at[2]);
            if (distanceKm < NEAR_KM && counts(other.place)) return { place: other.place, distanceKm };
          }
        }
      }
    }
    return undefined;
  }
}

function keyOf(x: number, y: number, z: number): number {
  return ((x + SPAN / 2) * SPAN + (y + SPAN / 2)) * SPAN + (z + SPAN / 2);
}

function toCartesianKm({ latitudeDeg, longitudeDeg }: Position): readonly [number, number, number] {
  const { axisDistance, z } = meridianOf(fromDegrees(latitudeDeg), metres(0));
  const longitude = fromDegrees(longitudeDeg);
  const p = axisDistance / 1000;
  return [p * Math.cos(longitude), p * Math.sin(longitude), z / 1000];
}

import { boundsOf } from '#components/map/bounds.ts';
import type { StudyCorridor } from '#contract/downrange.ts';
import type { Place } from '#core/downrange/geodesic.ts';

export type FrameKind = 'zone' | 'near' | 'whole';
type Corner = [longitudeDeg: number, latitudeDeg: number];

const NEAR_DEG = 9;
const RADIAN = Math.PI / 180;

/** Degrees of arc between two places on a sphere: enough to choose what a view shows. */
function arc(a: Place, b: Place): number {
  const cosine =
    Math.sin(a.latitudeDeg * RADIAN) * Math.sin(b.latitudeDeg * RADIAN) +
    Math.cos(a.latitudeDeg * RADIAN) *
      Math.cos(b.latitudeDeg * RADIAN) *
      Math.cos((a.longitudeDeg - b.longitudeDeg) * RADIAN);
  return Math.acos(Math.max(-1, Math.min(1, cosine))) / RADIAN;
}

/** The corners of a view of a corridor: its exclusion zone, its first 1,000 km or so, or all of it. */
export function frameOf(
  { corridor }: StudyCorridor,
  pad: Place,
  kind: FrameKind,
): [Corner, Corner] | undefined {
  const { geometry } = corridor.features[kind === 'zone' ? 0 : 1];
  const rings = geometry.type === 'Polygon' ? geometry.coordinates : geometry.coordinates.flat();
  const places = rings
    .flat()
    .map(([longitudeDeg = 0, latitudeDeg = 0]): Place => ({ longitudeDeg, latitudeDeg }))
    .filter((place) => kind !== 'near' || arc(pad, place) <= NEAR_DEG);
  const box = boundsOf([pad, ...places]);
  return (
    box && [
      [box.west, Math.max(-84, box.south)],
      [box.east, Math.min(84, box.north)],
    ]
  );
}

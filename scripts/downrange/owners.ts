import KDBush from 'kdbush';
import type { Position } from 'geojson';
import type { SettlementData } from '#core/downrange/data/settlement-data.ts';

/** Whether a place lies inside a ring of plane degrees: crossings of a ray to the east, counted. */
function isInside(ring: readonly Position[], longitude: number, latitude: number): boolean {
  let inside = false;
  ring.forEach(([x1 = 0, y1 = 0], at) => {
    const [x0 = 0, y0 = 0] = ring.at(at - 1) ?? [];
    if (y0 > latitude !== y1 > latitude && longitude < x0 + ((latitude - y0) / (y1 - y0)) * (x1 - x0))
      inside = !inside;
  });
  return inside;
}

const codeOf = ({ countryCodes, countries }: SettlementData, at: number): string =>
  countryCodes[countries[at] ?? 0] ?? '';

function mostFrequent(codes: readonly string[]): string | undefined {
  const counts = new Map<string, number>();
  for (const code of codes) counts.set(code, (counts.get(code) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1] || (a[0] < b[0] ? -1 : 1))[0]?.[0];
}

/**
 * Says which country each polygon's people are counted under. The atlas draws overseas parts with their mother
 * country and a few lands with no number; the gazetteer and the totals count them apart.
 */
export function ownerFinder(settlements: SettlementData) {
  const index = new KDBush(settlements.people.length);
  settlements.longitudesDeg.forEach((longitude, at) =>
    index.add(longitude, settlements.latitudesDeg[at] ?? 0),
  );
  index.finish();

  return (outline: readonly Position[], code: string | undefined): string | undefined => {
    const xs = outline.map(([x = 0]) => x);
    const ys = outline.map(([, y = 0]) => y);
    const near = index.range(Math.min(...xs), Math.min(...ys), Math.max(...xs), Math.max(...ys));
    const ownShare = near.filter((at) => codeOf(settlements, at) === code).length / near.length;
    if (near.length === 0 || ownShare > 0.5) return code;
    const inside = near.filter((at) =>
      isInside(outline, settlements.longitudesDeg[at] ?? 0, settlements.latitudesDeg[at] ?? 0),
    );
    // A settlement on a drawn shore may fall into the water; alone in the polygon's frame it still says whose it is.
    const codes = (inside.length > 0 ? inside : near).map((at) => codeOf(settlements, at));
    return code !== undefined && codes.includes(code) ? code : (mostFrequent(codes) ?? code);
  };
}

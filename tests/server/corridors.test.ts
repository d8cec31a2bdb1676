import { describe, expect, test, beforeAll } from 'vitest';
import { CorridorInput, CorridorOutput } from '#contract/corridor.ts';
import { corridorCollection } from '#server/corridors/present.ts';
import { respondWithCorridor } from '#server/corridors/respond.ts';
import { loadWorld } from '#server/corridors/world.ts';
import type { World } from '#core/downrange/index.ts';

let world: World;
beforeAll(async () => {
  world = await loadWorld();
}, 30_000);

const ask = (input: unknown) => CorridorOutput.parse(corridorCollection(world, CorridorInput.parse(input)));
const launch = { latitudeDeg: 7.42, longitudeDeg: -58.35, azimuthDeg: 20, vehicleClass: 'small' };

/** Twice the signed area in plane degrees: positive counterclockwise, as RFC 7946 section 3.1.6 asks. */
const turning = (ring: readonly (readonly number[])[]): number =>
  ring.slice(1).reduce((sum, [x1 = 0, y1 = 0], at) => {
    const [x0 = 0, y0 = 0] = ring[at] ?? [];
    return sum + (x0 * y1 - x1 * y0);
  }, 0);

const ringsOf = ({ geometry }: CorridorOutput['features'][number]) =>
  geometry.type === 'Polygon' ? geometry.coordinates : geometry.coordinates.flat();

describe('a corridor over the interface', () => {
  test.each([
    ['neither date line nor pole', launch, [1, 1]],
    ['the date line', { ...launch, latitudeDeg: -39, longitudeDeg: 178, azimuthDeg: 80 }, [1, 2]],
    [
      'the date line in the exclusion zone',
      { ...launch, latitudeDeg: 10, longitudeDeg: 180, azimuthDeg: 90 },
      [2, 2],
    ],
    ['the North Pole', { ...launch, latitudeDeg: 62, longitudeDeg: 20, azimuthDeg: 0 }, [1, 1]],
  ] as const)('is RFC 7946 across %s', (_, input, pieces) => {
    const { features } = ask(input);
    expect(features.map(({ properties }) => properties.kind)).toEqual(['exclusion-zone', 'corridor']);
    expect(features.map((one) => ringsOf(one).length)).toEqual(pieces);
    // π D² + 2 D D_OEZ of the small class, published.
    expect(features[0].properties.areaKm2).toBeWithin(42.738, 1e-3);
    for (const ring of features.flatMap(ringsOf)) {
      expect(ring.at(-1)).toEqual(ring[0]);
      expect(ring.length).toBeGreaterThanOrEqual(4);
      expect(turning(ring)).toBeGreaterThan(0);
      for (const [longitude = NaN, latitude = NaN] of ring) {
        expect(Math.abs(longitude)).toBeLessThanOrEqual(180);
        expect(Math.abs(latitude)).toBeLessThanOrEqual(90);
      }
    }
  });

  test('counts spread people apart, and leaves them out where the request says so', () => {
    const over = { ...launch, latitudeDeg: 28.5, longitudeDeg: -80.6, azimuthDeg: 90 };
    const [, spread] = ask(over).features;
    const [, listed] = ask({ ...over, settings: { spreadPeople: false } }).features;
    expect(spread.properties.people).toBe(listed.properties.people);
    expect(spread.properties.spreadPeople).toBeGreaterThan(1e8);
    expect(spread.properties.unknownPeopleLandKm2).toBeGreaterThan(0);
    expect(listed.properties).toMatchObject({ spreadPeople: null, unknownPeopleLandKm2: null });
    expect(listed.properties.casualtyExpectation.spreadPeople).toBeNull();
    // West Africa and the islands before it lie due east of Florida: the first land is Cape Verde's.
    expect(spread.properties).toMatchObject({ firstLandName: 'Cape Verde' });
    expect(spread.properties.firstLandKm).toBeWithin(5768, 10);
    const lands = spread.properties.lands.reduce((sum, { landKm2 }) => sum + landKm2, 0);
    expect(lands).toBeWithin(spread.properties.landKm2, 1e-6);
  });

  test('marks remembered casualty areas, and says whose they are where the request gives them', () => {
    const [, remembered] = ask(launch).features;
    const areas = [0.5, 0.2, 0.1];
    const [, given] = ask({ ...launch, settings: { casualtyAreasMi2: areas } }).features;
    expect(remembered.properties.casualtyExpectation.casualtyAreasNote).toMatch(
      'verify against the regulation',
    );
    expect(given.properties.casualtyExpectation).toMatchObject({
      casualtyAreasNote: 'As given with the request',
      failureProbability: 0.1,
      compareWith: 1e-4,
    });
    given.properties.casualtyExpectation.casualtyAreasMi2.forEach((area, at) =>
      expect(area).toBeWithin(areas[at] ?? NaN, 1e-12),
    );
  });

  test('names its limits and sources, and claims nothing', () => {
    const answer = ask(launch);
    expect(answer.cautions.join(' ')).toMatch(/Screening only/);
    expect(answer.attributions.join(' ')).toMatch(/GeoNames.*CC BY 4\.0/);
    expect(answer.regulation).toMatch(/14 CFR part 420/);
    expect(JSON.stringify(answer.features)).not.toMatch(/approv|complian|\bsafe\b/i);
  });

  test.each([
    [{ ...launch, azimuthDeg: 361 }, 'azimuthDeg'],
    [{ ...launch, latitudeDeg: 91 }, 'latitudeDeg'],
    [{ ...launch, longitudeDeg: 200 }, 'longitudeDeg'],
    [{ ...launch, vehicleClass: 'huge' }, 'vehicleClass'],
    [{ ...launch, rangeNm: 5001 }, 'rangeNm'],
    [{ ...launch, rangeNm: 10 }, 'rangeNm'],
    [{ ...launch, settings: { placeDensityPerKm2: 0 } }, 'settings.placeDensityPerKm2'],
    [{ ...launch, settings: { casualtyAreasMi2: [1, 2] } }, 'settings.casualtyAreasMi2'],
    [{ ...launch, extra: 1 }, ''],
  ])('refuses %o', (input, path) => {
    const { error } = CorridorInput.safeParse(input);
    expect(error?.issues.map((issue) => issue.path.join('.'))).toEqual([path]);
  });

  test('comes from a thread as GeoJSON, and a thread that fails fails the request', async () => {
    const input = CorridorInput.parse(launch);
    const answer = await respondWithCorridor(input, () => Promise.resolve(new TextEncoder().encode('{}')));
    expect(answer.headers.get('content-type')).toBe('application/geo+json');
    await expect(
      respondWithCorridor(input, () => Promise.reject(new Error('the thread ended'))),
    ).rejects.toThrow('the thread ended');
  });
});

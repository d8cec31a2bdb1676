import type { FeatureCollection, MultiLineString } from 'geojson';
import papaparse from 'papaparse';
import { afterAll, expect, test } from 'vitest';
import { AscentsQuery } from '#contract/study-ascents.ts';
import { flyAscent } from '#contract/flown-ascent.ts';
import { testDatabase } from '#tests/support/database.ts';
import { flownStudy, type FlownStudy } from '#tests/support/flown-study.ts';

const { db } = await testDatabase();
const { askAscents } = await import('#server/ascents/ask-ascents.ts');
const { readAscents } = await import('#server/ascents/read-ascents.ts');
const { exportTrajectoryCsv } = await import('#server/ascents/export-csv.ts');
const { exportTrajectoryGeoJson } = await import('#server/ascents/export-geojson.ts');
const { workAscents } = await import('#server/ascents/work-ascents.ts');
const { changeSite } = await import('#server/sites/change-site.ts');
const { stopAll } = await import('#server/lifecycle.ts');

const worker = workAscents({ db, atOnce: 1, fly: (task) => Promise.resolve(flyAscent(task)) });
afterAll(async () => {
  await worker.stop();
  await stopAll();
});

const pairOf = ({ member, siteIds, orbitIds }: FlownStudy) => ({
  studyId: member.studyId,
  siteId: siteIds[0] ?? '',
  orbitId: orbitIds[0] ?? '',
});

async function flown(latitudeDeg: number): Promise<FlownStudy> {
  const study = await flownStudy(db, { latitudesDeg: [latitudeDeg] });
  await askAscents(db, { member: study.member, input: {} });
  await expect
    .poll(
      async () => {
        const { studyId } = study.member;
        return (await readAscents(db, { studyId, query: AscentsQuery.parse({}) })).counts.current;
      },
      { timeout: 20_000, interval: 100 },
    )
    .toBe(1);
  return study;
}

type Row = Record<string, string>;

test('the CSV holds every moment in the units of its heading, from the pad to injection', async () => {
  const study = await flown(5);
  const answer = await exportTrajectoryCsv(db, pairOf(study));
  expect(answer.headers.get('content-type')).toBe('text/csv; charset=utf-8');
  expect(answer.headers.get('content-disposition')).toMatch(/filename="ascent-S0-[\w-]+\.csv"/);
  const { data, errors } = papaparse.parse<Row>((await answer.text()).trimEnd(), { header: true });
  expect(errors).toEqual([]);
  const [first, last] = [data[0], data.at(-1)];
  expect(first).toMatchObject({ time_s: '0', impact_kind: 'impact' });
  expect(Number(first?.['latitude_deg'])).toBeCloseTo(5, 9);
  expect(Number(first?.['longitude_deg'])).toBeCloseTo(10, 9);
  // Injection into the parking orbit, 185 km above the equatorial radius: the ellipsoid lies at most 21.4 km below it.
  expect(Number(last?.['altitude_m'])).toBeGreaterThan(185_000 - 1);
  expect(Number(last?.['altitude_m'])).toBeLessThan(185_000 + 21_385);
  expect(last).toMatchObject({ impact_kind: 'orbit', impact_latitude_deg: '', impact_time_s: '' });
  const times = data.map((row) => Number(row['time_s']));
  expect(times.every((time, at) => at === 0 || time > (times[at - 1] ?? 0) - 1e-6)).toBe(true);
});

test('the GeoJSON holds the flight with its heights, the impact points, and the caution', async () => {
  const study = await flown(5);
  const answer = await exportTrajectoryGeoJson(db, pairOf(study));
  expect(answer.headers.get('content-type')).toBe('application/geo+json');
  const { features } = (await answer.json()) as FeatureCollection<MultiLineString>;
  expect(features.map(({ properties }) => properties?.['what'] as string)).toEqual([
    'trajectory',
    'impact-points',
  ]);
  const [trajectory, impacts] = features;
  expect(trajectory?.geometry.coordinates[0]?.[0]).toEqual([
    expect.closeTo(10, 9),
    expect.closeTo(5, 9),
    expect.closeTo(0, 3),
  ]);
  expect(impacts?.geometry.coordinates[0]?.every((place) => place.length === 2)).toBe(true);
  for (const { properties } of features)
    expect(properties).toMatchObject({
      figuresAreStale: false,
      caution: 'Estimates for comparing sites, not flight data.',
    });
});

test('a file of earlier inputs says so in its name', async () => {
  const study = await flown(5);
  const pair = pairOf(study);
  await changeSite(db, { member: study.member, siteId: pair.siteId, version: 1, patch: { latitudeDeg: 6 } });
  const answer = await exportTrajectoryCsv(db, pair);
  expect(answer.headers.get('content-disposition')).toContain('-earlier-inputs.csv');
});

test('where nothing was flown, or no orbit was reached, there is no file', async () => {
  // Of a latitude that no other study here flies: what one has flown is another's for the same inputs.
  const asked = await flownStudy(db, { latitudesDeg: [7] });
  await expect(exportTrajectoryCsv(db, pairOf(asked))).rejects.toMatchObject({ code: 'not-found' });
  // From 85° to 20° the turn is over 60°.
  const far = await flownStudy(db, { latitudesDeg: [85], inclinationsDeg: [20] });
  await askAscents(db, { member: far.member, input: {} });
  await expect
    .poll(
      async () =>
        (await readAscents(db, { studyId: far.member.studyId, query: AscentsQuery.parse({}) })).counts
          .current,
      {
        timeout: 20_000,
        interval: 100,
      },
    )
    .toBe(1);
  await expect(exportTrajectoryGeoJson(db, pairOf(far))).rejects.toThrow('without reaching its orbit');
});

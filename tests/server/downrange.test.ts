import { beforeAll, describe, expect, test } from 'vitest';
import {
  FanQuery,
  StudyCorridor,
  StudyCorridorQuery,
  StudyFan,
  StudySurroundings,
  SurroundingsQuery,
} from '#contract/downrange.ts';
import { EvaluateInput } from '#contract/evaluate.ts';
import { evaluate } from '#contract/flights.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { CorridorInput } from '#contract/corridor.ts';
import { createStudy } from '#server/studies/create-study.ts';
import { corridorCollection } from '#server/corridors/present.ts';
import { loadWorld } from '#server/corridors/world.ts';
import { answerDownrange } from '#server/downrange/answer.ts';
import { corridorTask, fanTask, surroundingsTask } from '#server/downrange/ask.ts';
import { respondWithDownrange } from '#server/downrange/respond.ts';
import { removeVehicle } from '#server/requirement/change-vehicle.ts';
import { readVehicle } from '#server/requirement/read-requirement.ts';
import { readFirstSites } from '#server/sites/read-sites.ts';
import type { World } from '#core/downrange/index.ts';
import { between } from '#core/downrange/index.ts';
import { testDatabase } from '#tests/support/database.ts';
import { person } from '#tests/support/study.ts';

const { db } = await testDatabase();
let world: World;
beforeAll(async () => {
  world = await loadWorld();
}, 30_000);

/** A study of the example with its first two sites. */
async function example() {
  const who = await person(db);
  const email = `${who.userId}@spinward.test`;
  const { id: studyId } = await createStudy(db, {
    maker: { ...who, email },
    input: { title: 'Trial', from: 'example' },
  });
  const { items } = await readFirstSites(db, { studyId, limit: 2 });
  const [site, other] = items;
  if (!site || !other) throw new Error('the example has no sites');
  return { studyId, site, other };
}

/** What the study's vehicle carries to the orbit of the regulation's table, kg, by the evaluation that scripts have. */
async function payloadToTableOrbit(studyId: string): Promise<number | null | undefined> {
  const orbit = { code: 'T', perigeeKm: 185.2, apogeeKm: 185.2, inclinationDeg: 28, profile: 'direct' };
  const sites = [{ code: 'P', latitudeDeg: 28, longitudeDeg: 0 }];
  const { vehicle, settings } = await loadStudyInputs(db, studyId);
  const input = { sites, orbits: [{ ...orbit, parkingKm: 185.2 }], vehicle, settings };
  return evaluate(EvaluateInput.parse(input))[0]?.orbits[0]?.payloadKg;
}

test('a fan holds every whole degree, and the same figures as the corridor at each', async () => {
  const { studyId, site } = await example();
  const query = FanQuery.parse({ siteId: site.id, vehicleClass: 'small', rangeKm: '2000' });
  const fan = StudyFan.parse(answerDownrange(world, await fanTask(db, { studyId, query })));
  expect(fan.spokes.map(({ azimuthDeg }) => azimuthDeg)).toEqual(Array.from({ length: 360 }, (_, at) => at));
  for (const azimuthDeg of [0, 45, 133, 270]) {
    const asked = StudyCorridorQuery.parse({ ...query, azimuthDeg: String(azimuthDeg) });
    const answer = StudyCorridor.parse(
      answerDownrange(world, await corridorTask(db, { studyId, query: asked })),
    );
    const [zone, corridor] = answer.corridor.features;
    expect(fan.spokes[azimuthDeg]).toMatchObject({
      people: corridor.properties.people,
      settlements: answer.total,
      firstLandName: corridor.properties.firstLandName,
      excludedPeople: zone.properties.people,
    });
  }
});

test('a corridor is what the stateless address gives, with its settlements, most people first', async () => {
  const { studyId, site } = await example();
  const query = StudyCorridorQuery.parse({
    siteId: site.id,
    azimuthDeg: '250',
    vehicleClass: 'large',
    spreadPeople: 'false',
    casualtyAreasMi2: '0.5,0.2,0.1',
  });
  const task = await corridorTask(db, { studyId, query });
  const answer = StudyCorridor.parse(answerDownrange(world, task));
  const { latitudeDeg, longitudeDeg } = site;
  const stateless = CorridorInput.parse({
    latitudeDeg,
    longitudeDeg,
    azimuthDeg: 250,
    vehicleClass: 'large',
    settings: { spreadPeople: false, casualtyAreasMi2: [0.5, 0.2, 0.1] },
  });
  expect(answer.corridor).toEqual(corridorCollection(world, stateless));
  const people = answer.settlements.map((one) => one.people);
  expect(people).toEqual([...people].sort((a, b) => b - a));
  expect(answer.total).toBe(answer.corridor.features[1].properties.settlements);
  expect(answer.settlements.filter(({ excluded }) => excluded).length).toBe(
    answer.corridor.features[0].properties.settlements,
  );
});

test('surroundings count people by rings and name the study’s other sites by distance', async () => {
  const { studyId, site, other } = await example();
  const query = SurroundingsQuery.parse({ siteId: site.id });
  const answer = StudySurroundings.parse(
    answerDownrange(world, await surroundingsTask(db, { studyId, query })),
  );
  expect(answer.within.map(({ radiusKm }) => radiusKm)).toEqual([5, 10, 25, 50, 100]);
  for (const { radiusKm, people, settlements } of answer.within) {
    const inside = answer.places.filter(({ distanceKm }) => distanceKm <= radiusKm);
    expect(inside.length).toBe(settlements);
    expect(inside.reduce((sum, one) => sum + one.people, 0)).toBe(people);
  }
  expect(answer.otherSites).toHaveLength(11);
  const measured = between(site, other).distance / 1000;
  expect(answer.otherSites.find(({ siteId }) => siteId === other.id)?.distanceKm).toBeWithin(measured, 1e-9);
  expect(answer.otherSites.some(({ siteId }) => siteId === site.id)).toBe(false);
});

describe('the vehicle class', () => {
  test('is the study’s vehicle’s unless the request names one', async () => {
    const { studyId, site } = await example();
    const told = await fanTask(db, { studyId, query: FanQuery.parse({ siteId: site.id }) });
    const named = await fanTask(db, {
      studyId,
      query: FanQuery.parse({ siteId: site.id, vehicleClass: 'small' }),
    });
    // 14 CFR 420.19, table 1: large is above 18,500 lb to 100 nautical miles circular at 28° from a pad there.
    expect(await payloadToTableOrbit(studyId)).toBeGreaterThan(18_500 * 0.45359237);
    expect(told).toMatchObject({ vehicleClass: 'large' });
    expect(named).toMatchObject({ vehicleClass: 'small' });
  });

  test('has to be named where the study has no vehicle', async () => {
    const { studyId, site } = await example();
    const query = FanQuery.parse({ siteId: site.id });
    const { version } = (await readVehicle(db, { studyId }))!;
    const who = await person(db, 'Other');
    await removeVehicle(db, { member: { ...who, memberId: site.id, studyId, role: 'lead' }, version });
    await expect(fanTask(db, { studyId, query })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'vehicleClass' }],
    });
  });
});

test('a site of another study is not found', async () => {
  const [here, there] = [await example(), await example()];
  const query = FanQuery.parse({ siteId: there.site.id, vehicleClass: 'small' });
  await expect(fanTask(db, { studyId: here.studyId, query })).rejects.toMatchObject({ code: 'not-found' });
});

test.each([
  [FanQuery, { rangeKm: '20' }, 'rangeKm'],
  [FanQuery, { vehicleClass: 'huge' }, 'vehicleClass'],
  [FanQuery, { spreadPeople: 'perhaps' }, 'spreadPeople'],
  [SurroundingsQuery, { siteId: 'PV' }, 'siteId'],
  [SurroundingsQuery, { placeDensityPerKm2: '0' }, 'placeDensityPerKm2'],
  [StudyCorridorQuery, { azimuthDeg: '361' }, 'azimuthDeg'],
  [StudyCorridorQuery, { azimuthDeg: '90', casualtyAreasMi2: '1,2' }, 'casualtyAreasMi2'],
  [StudyCorridorQuery, { azimuthDeg: '90', casualtyAreasMi2: '1,x,2' }, 'casualtyAreasMi2.1'],
])('refuses what does not fit: %#', (schema, fields, path) => {
  const siteId = '0190a000-0000-7000-8000-000000000001';
  const { error } = schema.safeParse({ siteId, ...fields });
  expect(error?.issues.map((issue) => issue.path.join('.'))).toEqual([path]);
});

test('a thread that fails fails the request', async () => {
  const { studyId, site } = await example();
  const task = await surroundingsTask(db, { studyId, query: SurroundingsQuery.parse({ siteId: site.id }) });
  const answer = await respondWithDownrange(task, () => Promise.resolve(new TextEncoder().encode('{}')));
  expect(answer.headers.get('content-type')).toBe('application/json');
  await expect(
    respondWithDownrange(task, () => Promise.reject(new Error('the thread ended'))),
  ).rejects.toThrow('the thread ended');
});

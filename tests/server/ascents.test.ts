import { eq, sql } from 'drizzle-orm';
import { afterAll, afterEach, expect, test, vi } from 'vitest';
import type { AscentTask } from '#contract/ascent-job.ts';
import type { EvaluateOutput } from '#contract/evaluate.ts';
import { AscentsQuery } from '#contract/study-ascents.ts';
import { MOST_ATTEMPTS } from '#db/queries/ascent.ts';
import { ascent } from '#db/schema/ascent.ts';
import { site } from '#db/schema/site.ts';
import { study } from '#db/schema/study.ts';
import type { FlyAscent } from '#server/ascents/fly-batch.ts';
import { testDatabase } from '#tests/support/database.ts';
import { flownStudy, flownVehicle, type FlownStudy } from '#tests/support/flown-study.ts';
import { expectSoon } from '#tests/support/soon.ts';
import { standInFlight } from '#tests/support/stand-in-flight.ts';

const { db } = await testDatabase();
const { askAscents } = await import('#server/ascents/ask-ascents.ts');
const { cancelAscents } = await import('#server/ascents/cancel-ascents.ts');
const { readAscent, readAscents } = await import('#server/ascents/read-ascents.ts');
const { workAscents } = await import('#server/ascents/work-ascents.ts');
const { putVehicle, removeVehicle } = await import('#server/requirement/change-vehicle.ts');
const { readVehicle } = await import('#server/requirement/read-requirement.ts');
const { changeSettings } = await import('#server/requirement/change-settings.ts');
const { respondForStudy } = await import('#server/evaluate/respond-for-study.ts');
const { eventStream } = await import('#server/events/stream.ts');
const { stopAll } = await import('#server/lifecycle.ts');
afterAll(stopAll);

const workers: { stop: () => Promise<void> }[] = [];
afterEach(async () => {
  await Promise.all(workers.splice(0).map((worker) => worker.stop()));
});

/** A worker in this process, with what it flew. */
function worker({
  fly = standInFlight,
  atOnce = 2,
}: { fly?: FlyAscent; atOnce?: number } = {}): AscentTask[] {
  const flown: AscentTask[] = [];
  workers.push(
    workAscents({
      db,
      atOnce,
      fly: (task) => {
        flown.push(task);
        return fly(task);
      },
    }),
  );
  return flown;
}

const ask = ({ member }: FlownStudy, input = {}) => askAscents(db, { member, input });
const read = ({ member: { studyId } }: FlownStudy, query = {}) =>
  readAscents(db, { studyId, query: AscentsQuery.parse(query) });
const counts = async (which: FlownStudy) =>
  Object.fromEntries(Object.entries((await read(which, { list: 'false' })).counts).filter(([, n]) => n > 0));
const until = (which: FlownStudy, wanted: Record<string, number>) =>
  vi.waitFor(async () => expect(await counts(which)).toEqual(wanted), { timeout: 10_000, interval: 50 });
const latitudes = (flown: readonly AscentTask[]) => flown.map((task) => task.site.latitudeDeg);

test('what is asked for is flown, once each, and can be read with its trajectory', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [1, 2, 3], inclinationsDeg: [51.6, 97] });
  expect(await counts(trial)).toEqual({ missing: 6 });
  expect(await ask(trial)).toEqual({ underWay: 6, current: 0 });
  expect(await counts(trial)).toEqual({ waiting: 6 });
  expect(await ask(trial)).toEqual({ underWay: 6, current: 0 });
  const flown = worker();
  await until(trial, { current: 6 });
  expect(flown).toHaveLength(6);
  expect(await ask(trial)).toEqual({ underWay: 0, current: 6 });

  const [siteId = '', orbitId = ''] = [trial.siteIds[1], trial.orbitIds[0]];
  const { studyId } = trial.member;
  expect(await readAscent(db, { studyId, siteId, orbitId })).toMatchObject({
    state: 'current',
    requestedBy: trial.member.name,
    figures: { converged: true, payloadKg: 1_000 - 8 - 5, lossesMps: { gravity: 1_200 } },
    figuresAreStale: false,
    hash: expect.stringMatching(/^[0-9a-f]{64}$/),
    trajectory: [{ timeS: 0, latitudeDeg: 2 }],
  });
  expect((await read(trial, { siteId })).items).toHaveLength(2);
  expect(await read(trial, { list: 'false' })).toMatchObject({ items: [], secondsLeft: 0 });
});

test('two studies with the same inputs share what is flown', async () => {
  const [first, second] = [
    await flownStudy(db, { latitudesDeg: [11, 12] }),
    await flownStudy(db, { latitudesDeg: [12, 13] }),
  ];
  await Promise.all([ask(first), ask(second)]);
  const flown = worker();
  await Promise.all([until(first, { current: 2 }), until(second, { current: 2 })]);
  expect(latitudes(flown).sort()).toEqual([11, 12, 13]);
});

test('names and entered losses move no flight; a place, an orbit and a vehicle do, and old results say so', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [21, 22] });
  const { member, siteIds } = trial;
  await ask(trial);
  worker();
  await until(trial, { current: 2 });

  await db
    .update(site)
    .set({ name: 'Renamed' })
    .where(eq(site.id, siteIds[0] ?? ''));
  const { version } = await readVehicle(db, member);
  const renamed = { ...flownVehicle, name: 'Other', lossesMps: { gravity: 1, drag: 1, steering: 1 } };
  await putVehicle(db, { member, version, input: { vehicle: renamed } });
  expect(await counts(trial)).toEqual({ current: 2 });

  await db
    .update(site)
    .set({ latitudeDeg: 23 })
    .where(eq(site.id, siteIds[0] ?? ''));
  const before = await read(trial);
  expect(before.items[0]).toMatchObject({
    state: 'stale',
    figuresAreStale: true,
    figures: { payloadKg: 1_000 - 84 - 5 },
  });
  expect(await counts(trial)).toEqual({ stale: 1, current: 1 });

  await putVehicle(db, { member, version: version + 1, input: { vehicle: { ...renamed, reserveMps: 90 } } });
  expect(await counts(trial)).toEqual({ stale: 2 });
  await ask(trial);
  await until(trial, { current: 2 });
  expect((await read(trial)).items[0]).toMatchObject({ figures: { payloadKg: 1_000 - 92 - 5 } });
});

test('until a new result is there the old one is shown as old', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [26] });
  await ask(trial);
  worker();
  await until(trial, { current: 1 });
  await workers.pop()?.stop();
  await db
    .update(site)
    .set({ elevationM: 900 })
    .where(eq(site.id, trial.siteIds[0] ?? ''));
  await ask(trial);
  expect((await read(trial)).items).toMatchObject([
    { state: 'waiting', figuresAreStale: true, figures: { payloadKg: 1_000 - 104 - 5 } },
  ]);
  // What it asked for of earlier inputs and is not flown yet is no longer wanted.
  await db
    .update(site)
    .set({ elevationM: 901 })
    .where(eq(site.id, trial.siteIds[0] ?? ''));
  await ask(trial);
  const flown = worker();
  await until(trial, { current: 1 });
  expect(flown.map((task) => task.site.elevationM)).toEqual([901]);
});

test('cancelling takes back what waits, ends a batch after the flight under way, and leaves other studies theirs', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [31, 32, 33, 34] });
  const other = await flownStudy(db, { latitudesDeg: [34] });
  await ask(trial);
  await ask(other);
  let land: () => void = () => undefined;
  const landed = new Promise<void>((resolve) => (land = resolve));
  const flown: number[] = [];
  workers.push(
    workAscents({
      db,
      atOnce: 1,
      fly: async (task) => {
        flown.push(task.site.latitudeDeg);
        await landed;
        return standInFlight(task);
      },
    }),
  );
  await until(trial, { flying: 1, waiting: 3 });
  expect(await cancelAscents(db, { member: trial.member, scope: {} })).toEqual({ cancelled: 4 });
  land();
  await until(other, { current: 1 });
  // The one in the air was kept; the one the other study wants was flown for it.
  await until(trial, { current: 2, cancelled: 2 });
  expect(flown).toHaveLength(2);
  expect(await ask(trial)).toEqual({ underWay: 2, current: 2 });
  await until(trial, { current: 4 });
});

test('one site and orbit can be cancelled alone', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [36, 37] });
  await ask(trial);
  const scope = { siteId: trial.siteIds[0] };
  expect(await cancelAscents(db, { member: trial.member, scope })).toEqual({ cancelled: 1 });
  const flown = worker();
  await until(trial, { current: 1, cancelled: 1 });
  expect(latitudes(flown)).toEqual([37]);
});

test('what a person asks for by name comes before whole studies, even where it waits with them', async () => {
  const whole = await flownStudy(db, { latitudesDeg: Array.from({ length: 20 }, (_, i) => 41 + i / 10) });
  await ask(whole);
  const [siteId = '', orbitId = ''] = [whole.siteIds[19], whole.orbitIds[0]];
  const pairs = [{ siteId, orbitId }];
  expect(await ask(whole, { pairs })).toEqual({ underWay: 1, current: 0 });
  const flown = worker({ atOnce: 1 });
  await until(whole, { current: 20 });
  expect(flown[0]?.site.latitudeDeg).toBe(42.9);
  expect(flown).toHaveLength(20);
});

test('a flight that fails is tried again; one that always fails says why, and the others are flown', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [51, 52, 53] });
  await ask(trial);
  const failed = new Set<number>();
  const fly: FlyAscent = async (task) => {
    const latitude = task.site.latitudeDeg;
    if (latitude === 52) throw new Error('The thread ran out of memory.');
    if (latitude === 53 && failed.size === failed.add(latitude).size - 1) throw new Error('Once.');
    return standInFlight(task);
  };
  const flown = worker({ fly });
  await until(trial, { current: 2, failed: 1 });
  expect(latitudes(flown).filter((latitude) => latitude === 52)).toHaveLength(MOST_ATTEMPTS);
  expect((await read(trial)).items[1]).toMatchObject({
    state: 'failed',
    reason: 'The thread ran out of memory.',
  });
  const [row] = await db
    .select({ failures: ascent.failures })
    .from(ascent)
    .where(sql`(task #>> '{site,latitudeDeg}')::float8 = 53`);
  expect(row?.failures.map(({ reason }) => reason)).toEqual(['Once.']);
});

test('a worker that is stopped lets the flight under way end and hands back the rest at once', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [56, 57, 58] });
  // All in one batch, so that the rest of it has to be handed back.
  await ask(trial);
  await db.execute(sql`update ascent set batch_id = (select min(batch_id::text)::uuid from ascent
    where state = 'waiting') where state = 'waiting'`);
  await db.execute(sql`update pgboss.job set data = jsonb_build_object('hashes',
    (select jsonb_agg(hash order by (task #>> '{site,latitudeDeg}')) from ascent where state = 'waiting'))
    where name = 'ascents' and id = (select min(batch_id::text)::uuid from ascent where state = 'waiting')`);
  const stopped = workAscents({ db, atOnce: 1, fly: (task) => standInFlight(task, 300) });
  await until(trial, { flying: 1, waiting: 2 });
  await stopped.stop();
  expect(await counts(trial)).toEqual({ current: 1, waiting: 2 });
  expect((await read(trial)).secondsLeft).toBeGreaterThan(0);
  const flown = worker();
  await until(trial, { current: 3 });
  expect(latitudes(flown)).toEqual([57, 58]);
});

test('screens hear that ascents move on, some times a second however many are flown', async () => {
  const trial = await flownStudy(db, { latitudesDeg: Array.from({ length: 100 }, (_, i) => 60 + i / 100) });
  const stranger = await flownStudy(db, { latitudesDeg: [65] });
  const abort = new AbortController();
  const heard = async ({ member: { userId } }: FlownStudy): Promise<string> => {
    const options = { db, userId, studyId: null, signal: abort.signal, lastEventId: null };
    let text = '';
    const decoder = new TextDecoder();
    for await (const chunk of eventStream(options).body ?? []) text += decoder.decode(chunk);
    return text;
  };
  const texts = Promise.all([heard(trial), heard(stranger)]);
  const started = performance.now();
  await ask(trial);
  worker();
  await until(trial, { current: 100 });
  await new Promise((resolve) => setTimeout(resolve, 1_200));
  abort.abort();
  const [own, others] = await texts;
  const seconds = (performance.now() - started) / 1_000;
  const told = own.match(/event: progress/g)?.length ?? 0;
  expect(told).toBeGreaterThanOrEqual(2);
  expect(told).toBeLessThanOrEqual(2 * seconds + 2);
  expect(own).toContain(`{"studyId":"${trial.member.studyId}","objects":["ascent"]}`);
  expect(others).not.toContain('event: progress');
});

test('thousands are asked for, looked at and cancelled in a moment', async () => {
  const latitudesDeg = Array.from({ length: 2_000 }, (_, i) => -60 + i / 50);
  const trial = await flownStudy(db, { latitudesDeg, inclinationsDeg: [60, 70, 80] });
  const soon = async <T>(what: string, goalMs: number, work: () => Promise<T>): Promise<T> => {
    const started = performance.now();
    const result = await work();
    expectSoon(what, performance.now() - started, goalMs);
    return result;
  };
  expect(await soon('asking for 6,000 ascents', 2_000, () => ask(trial))).toMatchObject({ underWay: 6_000 });
  expect(await soon('counting them', 500, () => counts(trial))).toEqual({ waiting: 6_000 });
  const cancel = () => cancelAscents(db, { member: trial.member, scope: {} });
  expect(await soon('cancelling them', 1_500, cancel)).toEqual({ cancelled: 6_000 });
  const { rows } = await db.execute(`select count(*)::int as n from pgboss.job
    where name = 'ascents' and state < 'completed'`);
  expect(rows).toEqual([{ n: 0 }]);
});

test('what cannot be flown says why and asks for nothing', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [71] });
  const { member } = trial;
  const stranger = { siteId: trial.orbitIds[0] ?? '', orbitId: trial.orbitIds[0] ?? '' };
  await expect(ask(trial, { pairs: [stranger] })).rejects.toMatchObject({ code: 'invalid' });
  const { version } = await readVehicle(db, member);
  await removeVehicle(db, { member, version });
  expect((await read(trial)).obstacle).toBe('The study has no vehicle yet.');
  await expect(ask(trial)).rejects.toMatchObject({ code: 'conflict' });
  await db.update(study).set({ archivedAt: new Date() }).where(eq(study.id, member.studyId));
  await expect(ask(trial)).rejects.toMatchObject({ code: 'study-archived' });
});

test('with flown losses the evaluation waits for what is not flown, then takes its payload and losses', async () => {
  const trial = await flownStudy(db, { latitudesDeg: [61.25] });
  const { member } = trial;
  await changeSettings(db, { member, version: 1, patch: { losses: 'flown' } });
  const evaluated = async () => {
    const { sites } = (await (await respondForStudy(db, member)).json()) as EvaluateOutput;
    return sites[0];
  };
  expect(await evaluated()).toMatchObject({
    payloadPerYearKg: 0,
    orbits: [{ payloadKg: null, shortfallMps: null }],
  });
  await ask(trial);
  worker();
  await until(trial, { current: 1 });
  // The stand-in carries 1,000 − 4 × 61.25 − 5 kg; required 7,400 − 5 m/s of the ideal 9,000.
  expect(await evaluated()).toMatchObject({
    orbits: [{ payloadKg: 750, deltaVMps: { required: 7_395, losses: 1_605, dogleg: 0 } }],
  });
});

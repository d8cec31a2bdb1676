import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { OrbitInput } from '#contract/requirement.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import { criterion } from '#db/schema/criterion.ts';
import { record } from '#db/schema/record.ts';
import { libraryVehicle, study } from '#db/schema/study.ts';
import type { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { addOrbit } from '#server/requirement/add-orbit.ts';
import { changeOrbit } from '#server/requirement/change-orbit.ts';
import { changeSettings } from '#server/requirement/change-settings.ts';
import { putVehicle, removeVehicle } from '#server/requirement/change-vehicle.ts';
import {
  listOrbits,
  listVehicles,
  readManifest,
  readSettings,
  readVehicle,
} from '#server/requirement/read-requirement.ts';
import { removeOrbit } from '#server/requirement/remove-orbit.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const all = { query: '', page: 1, pageSize: 50 };
const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );
const linesOf = ({ studyId }: Member) =>
  db.select().from(record).where(eq(record.studyId, studyId)).orderBy(record.id);
const orbit = (fields: object = {}) =>
  OrbitInput.parse({ name: 'Station', perigeeKm: 420.1, apogeeKm: 420.1, inclinationDeg: 51.6, ...fields });
const vehicle = VehicleInput.parse({
  name: 'Trial lifter',
  lossesMps: { gravity: 1300, drag: 100, steering: 40 },
  stages: [{ dryKg: 900, propellantKg: 9000, thrustVacKn: 190, ispVacS: 300 }],
});

describe('the manifest', () => {
  test('an orbit gets the next code, comes last, moves the revision and is recorded as it was written', async () => {
    const member = await studyWith(db, 'engineer');
    await addOrbit(db, { member, input: orbit() });
    const second = await addOrbit(db, { member, input: orbit({ name: 'Polar', inclinationDeg: 90 }) });
    expect(second).toMatchObject({ code: 'O2', position: 1, perigeeKm: 420.1, version: 1, revision: 3 });
    expect((await linesOf(member))[1]).toMatchObject({
      object: 'orbit',
      action: 'add',
      from: null,
      to: { code: 'O2', name: 'Polar', perigeeKm: 420.1 },
    });
  });

  test('a patch changes what it names; sun-synchronous and an inclination take each other’s place', async () => {
    const member = await studyWith(db, 'engineer');
    const { id: orbitId } = await addOrbit(db, { member, input: orbit() });
    const patch = (version: number, fields: object) =>
      changeOrbit(db, { member, orbitId, version, patch: fields });
    expect(await patch(1, { sunSynchronous: true })).toMatchObject({
      sunSynchronous: true,
      inclinationDeg: null,
      perigeeKm: 420.1,
      version: 2,
    });
    expect(await patch(2, { inclinationDeg: 28.5 })).toMatchObject({
      sunSynchronous: false,
      inclinationDeg: 28.5,
    });
    await expect(patch(3, { sunSynchronous: false, inclinationDeg: null })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'inclinationDeg' }],
    });
    await expect(patch(3, { perigeeKm: 500 })).rejects.toMatchObject({ errors: [{ path: 'perigeeKm' }] });
    expect((await linesOf(member)).map(({ action }) => action)).toEqual(['add', 'change', 'change']);
  });

  test('a stale write changes nothing and brings what there is now', async () => {
    const member = await studyWith(db, 'engineer');
    const { id: orbitId } = await addOrbit(db, { member, input: orbit() });
    await changeOrbit(db, { member, orbitId, version: 1, patch: { flightsPerYear: 4 } });
    const late = changeOrbit(db, { member, orbitId, version: 1, patch: { flightsPerYear: 6 } });
    await expect(late).rejects.toMatchObject({ code: 'stale', current: { flightsPerYear: 4, version: 2 } });
    expect((await readManifest(db, member))[0]?.flightsPerYear).toBe(4);
  });

  test('a write that changes nothing moves neither version nor revision', async () => {
    const member = await studyWith(db, 'engineer');
    const { id: orbitId } = await addOrbit(db, { member, input: orbit() });
    const same = await changeOrbit(db, { member, orbitId, version: 1, patch: { perigeeKm: 420.1 } });
    expect(same).toMatchObject({ version: 1, revision: 2 });
  });

  test('orbits trade places, and a removed one can be put back where it was', async () => {
    const member = await studyWith(db, 'engineer');
    const made = [];
    for (const code of ['A', 'B', 'C']) made.push(await addOrbit(db, { member, input: orbit({ code }) }));
    const order = async () =>
      (await readManifest(db, member)).map(({ code, position }) => `${code}${position}`).join();
    const [, b, c] = made;
    if (!b || !c) throw new Error('no orbits');
    await changeOrbit(db, { member, orbitId: c.id, version: 1, patch: { position: 0 } });
    expect(await order()).toBe('C0,A1,B2');
    await removeOrbit(db, { member, orbitId: c.id, version: 1 });
    expect(await order()).toBe('A0,B1');
    await addOrbit(db, { member, input: orbit({ code: 'C', position: 0 }) });
    expect(await order()).toBe('C0,A1,B2');
    await changeOrbit(db, { member, orbitId: b.id, version: 1, patch: { position: 99 } });
    expect(await order()).toBe('C0,A1,B2');
  });

  test('a manifest has each code once', async () => {
    const member = await studyWith(db, 'engineer');
    await addOrbit(db, { member, input: orbit({ code: 'LEO' }) });
    const { id: orbitId } = await addOrbit(db, { member, input: orbit() });
    expect(await codeOf(addOrbit(db, { member, input: orbit({ code: 'LEO' }) }))).toBe('invalid');
    const renamed = changeOrbit(db, { member, orbitId, version: 1, patch: { code: 'LEO' } });
    expect(await codeOf(renamed)).toBe('invalid');
  });

  test('an orbit that a criterion is worked out for stays, and the criterion is named', async () => {
    const member = await studyWith(db, 'engineer');
    const { id: orbitId } = await addOrbit(db, { member, input: orbit() });
    await db.insert(criterion).values({
      studyId: member.studyId,
      position: 0,
      name: 'Payload to Station',
      nameKey: 'payload to station',
      direction: 'more',
      source: 'computed',
      quantity: 'payload',
      orbitId,
    });
    const removal = removeOrbit(db, { member, orbitId, version: 1 });
    await expect(removal).rejects.toMatchObject({
      code: 'conflict',
      current: { criteria: ['Payload to Station'] },
    });
    expect(await readManifest(db, member)).toHaveLength(1);
  });

  test('an orbit of another study is not found', async () => {
    const theirs = await studyWith(db, 'engineer');
    const { id: orbitId } = await addOrbit(db, { member: theirs, input: orbit() });
    const member = await studyWith(db, 'lead');
    expect(await codeOf(removeOrbit(db, { member, orbitId, version: 1 }))).toBe('not-found');
    expect(await codeOf(changeOrbit(db, { member, orbitId, version: 1, patch: {} }))).toBe('not-found');
  });

  test('in review the manifest is locked', async () => {
    const member = await studyWith(db, 'lead', { state: 'in-review' });
    expect(await codeOf(addOrbit(db, { member, input: orbit() }))).toBe('study-locked');
  });

  test('orbits are found by name, a page at a time', async () => {
    const member = await studyWith(db, 'engineer');
    for (const name of ['Low', 'Middle', 'High']) await addOrbit(db, { member, input: orbit({ name }) });
    const { studyId } = member;
    expect(await listOrbits(db, { studyId, ...all, page: 2, pageSize: 2 })).toMatchObject({
      total: 3,
      items: [{ name: 'High' }],
    });
    expect((await listOrbits(db, { studyId, ...all, query: 'mid' })).items).toMatchObject([
      { name: 'Middle' },
    ]);
  });
});

describe('the vehicle', () => {
  test('there is none at first; one entered is kept whole, and later writes need its version', async () => {
    const member = await studyWith(db, 'engineer');
    expect(await readVehicle(db, member)).toEqual({ vehicle: null, libraryVehicleId: null, version: 0 });
    const put = await putVehicle(db, { member, version: undefined, input: { vehicle } });
    expect(put).toMatchObject({ vehicle, libraryVehicleId: null, revision: 2 });
    expect(await codeOf(putVehicle(db, { member, version: undefined, input: { vehicle } }))).toBe(
      'version-required',
    );
    const late = putVehicle(db, { member, version: 0, input: { vehicle } });
    await expect(late).rejects.toMatchObject({
      code: 'stale',
      current: { vehicle: { name: 'Trial lifter' } },
    });
  });

  test('one of the library is copied: a later change of the library moves no study', async () => {
    const member = await studyWith(db, 'engineer');
    const [entry] = await db
      .insert(libraryVehicle)
      .values({ code: 'TRIAL', name: 'Trial lifter', spec: vehicle })
      .returning({ id: libraryVehicle.id });
    if (!entry) throw new Error('no library entry');
    const put = await putVehicle(db, { member, version: 0, input: { libraryVehicleId: entry.id } });
    expect(put).toMatchObject({ vehicle, libraryVehicleId: entry.id });
    await db
      .update(libraryVehicle)
      .set({ spec: { ...vehicle, reserveMps: 500 }, archivedAt: new Date() })
      .where(eq(libraryVehicle.id, entry.id));
    expect(await readVehicle(db, member)).toMatchObject({ vehicle: { reserveMps: 0 } });
    expect((await listVehicles(db, all)).items.map(({ code }) => code)).not.toContain('TRIAL');
    const again = putVehicle(db, { member, version: put.version, input: { libraryVehicleId: entry.id } });
    expect(await codeOf(again)).toBe('invalid');
  });

  test('the versions of a removed vehicle never come again', async () => {
    const member = await studyWith(db, 'engineer');
    const first = await putVehicle(db, { member, version: 0, input: { vehicle } });
    await removeVehicle(db, { member, version: first.version });
    const second = await putVehicle(db, { member, version: 0, input: { vehicle } });
    expect(second.version).toBeGreaterThan(first.version);
    expect(await codeOf(removeVehicle(db, { member, version: first.version }))).toBe('stale');
    expect((await linesOf(member)).map(({ action }) => action)).toEqual(['add', 'remove', 'add']);
  });

  test('the same vehicle again moves nothing', async () => {
    const member = await studyWith(db, 'engineer');
    const { version } = await putVehicle(db, { member, version: 0, input: { vehicle } });
    expect(await putVehicle(db, { member, version, input: { vehicle } })).toMatchObject({
      version,
      revision: 2,
    });
  });
});

describe('settings', () => {
  test('a setting has a version of its own and is recorded from and to', async () => {
    const member = await studyWith(db, 'engineer');
    expect(await readSettings(db, member)).toEqual({
      turnSpeedFraction: 0.6,
      losses: 'entered',
      version: 1,
    });
    const changed = await changeSettings(db, { member, version: 1, patch: { turnSpeedFraction: 0.7 } });
    expect(changed).toMatchObject({ turnSpeedFraction: 0.7, version: 2, revision: 2 });
    expect(await codeOf(changeSettings(db, { member, version: 1, patch: { turnSpeedFraction: 0.8 } }))).toBe(
      'stale',
    );
    const [row] = await db.select().from(study).where(eq(study.id, member.studyId));
    expect(row).toMatchObject({ version: 1, settingsVersion: 2 });
    expect(await linesOf(member)).toMatchObject([
      { object: 'settings', from: { turnSpeedFraction: 0.6 }, to: { turnSpeedFraction: 0.7 } },
    ]);
  });

  test('losses are entered at first; choosing flown ones is a change of the inputs', async () => {
    const member = await studyWith(db, 'engineer');
    const flown = await changeSettings(db, { member, version: 1, patch: { losses: 'flown' } });
    expect(flown).toMatchObject({ turnSpeedFraction: 0.6, losses: 'flown', version: 2, revision: 2 });
    const again = await changeSettings(db, { member, version: 2, patch: { losses: 'flown' } });
    expect(again).toMatchObject({ version: 2, revision: 2 });
    expect(await linesOf(member)).toMatchObject([
      { object: 'settings', from: { losses: 'entered' }, to: { losses: 'flown' } },
    ]);
  });
});

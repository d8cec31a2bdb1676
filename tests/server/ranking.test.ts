import { describe, expect, test } from 'vitest';
import { CriterionInput, type CriterionDraft } from '#contract/criterion.ts';
import { Ranking, RankingFigures } from '#contract/ranking.ts';
import { OrbitInput } from '#contract/requirement.ts';
import { SiteInput, type SiteDraft } from '#contract/site.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { evaluateStudy } from '#server/evaluate/evaluate-study.ts';
import type { Member } from '#server/member.ts';
import { readFigures, readRanking, readRankingStart } from '#server/ranking/read-ranking.ts';
import { addOrbit } from '#server/requirement/add-orbit.ts';
import { putVehicle } from '#server/requirement/change-vehicle.ts';
import { addSite } from '#server/sites/add-site.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const vehicle = VehicleInput.parse({
  name: 'Trial lifter',
  lossesMps: { gravity: 1300, drag: 100, steering: 40 },
  stages: [
    { dryKg: 9000, propellantKg: 120000, thrustVacKn: 2200, ispVacS: 311, ispSeaLevelS: 283 },
    { dryKg: 1800, propellantKg: 24000, thrustVacKn: 180, ispVacS: 345 },
  ],
});

const add = (member: Member, draft: CriterionDraft) =>
  addCriterion(db, { member, input: CriterionInput.parse(draft) });
const put = (member: Member, draft: SiteDraft) => addSite(db, { member, input: SiteInput.parse(draft) });
const weigh = (member: Member, points: Record<string, number>, weights: 'study' | 'mine' = 'study') =>
  saveWeights(db, { member, weights, version: 0, input: { points } });
const ranked = (member: Member, weights: 'study' | 'mine' = 'study') =>
  readRanking(db, { ...member, weights });
const place = (name: string, latitudeDeg: number, values: Record<string, number> = {}): SiteDraft => ({
  name,
  latitudeDeg,
  longitudeDeg: 10 + latitudeDeg / 7,
  values,
});

describe('entered criteria', () => {
  test('rank by weighted value, worked by hand; set-aside and incomplete sites stand apart', async () => {
    const member = await studyWith(db, 'lead');
    const cost = await add(member, {
      source: 'entered',
      name: 'Cost',
      unit: 'M€',
      direction: 'less',
      levels: { mode: 'fixed', worst: 400, best: 200 },
      limit: { kind: 'at-most', value: 390 },
    });
    const days = await add(member, {
      source: 'entered',
      name: 'Launch days',
      unit: 'days',
      direction: 'more',
      levels: { mode: 'fixed', worst: 100, best: 300 },
    });
    await put(member, place('Near', 1, { [cost.id]: 250, [days.id]: 200 }));
    await put(member, place('Far', 2, { [cost.id]: 300, [days.id]: 300 }));
    await put(member, place('Dear', 3, { [cost.id]: 395, [days.id]: 300 }));
    await put(member, place('Unknown', 4, { [days.id]: 260 }));
    await weigh(member, { [cost.id]: 60, [days.id]: 40 });
    const ranking = await ranked(member);
    expect(Ranking.safeParse(ranking).error).toBeUndefined();
    // Far: 0.6 × 0.5 + 0.4 × 1 = 0.70. Near: 0.6 × 0.75 + 0.4 × 0.5 = 0.65. Unknown: 0.32 to 0.92.
    expect(ranking.ranked.map(({ rank, name, value }) => [rank, name, Number(value.toFixed(12))])).toEqual([
      [1, 'Far', 0.7],
      [2, 'Near', 0.65],
    ]);
    expect(ranking.margin).toBeCloseTo(0.05, 12);
    expect(ranking.ranked[0]?.contributions[1]).toMatchObject({
      figure: 300,
      value: 1,
      weight: 0.4,
      term: 0.4,
    });
    expect(ranking.incomplete).toMatchObject([
      { name: 'Unknown', bestRank: 1, worstRank: 3, missing: [cost.id] },
    ]);
    expect(ranking.incomplete[0]?.value).toBeCloseTo(0.32, 12);
    expect(ranking.incomplete[0]?.bestValue).toBeCloseTo(0.92, 12);
    expect(ranking.setAside).toMatchObject([
      { name: 'Dear', reasons: [{ criterionId: cost.id, message: 'Cost 395 M€, limit ≤ 390' }] },
    ]);
    expect(ranking.counts).toEqual({ ranked: 2, incomplete: 1, setAside: 1 });
  });

  test('a member’s own weights rank for that member alone', async () => {
    const member = await studyWith(db, 'lead');
    const a = await add(member, { source: 'entered', name: 'A', direction: 'more' });
    const b = await add(member, { source: 'entered', name: 'B', direction: 'more' });
    await put(member, place('Left', 1, { [a.id]: 1, [b.id]: 0 }));
    await put(member, place('Right', 2, { [a.id]: 0, [b.id]: 1 }));
    await weigh(member, { [a.id]: 2, [b.id]: 1 });
    await weigh(member, { [a.id]: 1, [b.id]: 2 }, 'mine');
    expect((await ranked(member)).ranked[0]?.name).toBe('Left');
    expect((await ranked(member, 'mine')).ranked[0]?.name).toBe('Right');
    expect(await readRankingStart(db, { ...member, weights: 'mine' })).toMatchObject({
      ranking: { weights: 'mine' },
      study: { version: 1 },
      mine: { version: 1, weights: 'mine' },
    });
  });

  test('says what is missing before there are ranks', async () => {
    const member = await studyWith(db, 'lead');
    expect((await ranked(member)).state).toBe('no-sites');
    await put(member, place('Left', 1));
    expect((await ranked(member)).state).toBe('no-criteria');
    const text = await add(member, { source: 'text', name: 'Owner', direction: 'more' });
    expect(await ranked(member)).toMatchObject({ state: 'no-criteria', criteria: [] });
    const a = await add(member, { source: 'entered', name: 'A', direction: 'more' });
    expect(await ranked(member)).toMatchObject({
      state: 'no-weights',
      ranked: [],
      incomplete: [],
      margin: null,
    });
    await weigh(member, { [a.id]: 1 });
    expect(await ranked(member)).toMatchObject({ state: 'ranked', incomplete: [{ name: 'Left' }] });
    await expect(weigh(member, { [text.id]: 1 }, 'mine')).rejects.toMatchObject({ code: 'invalid' });
  });
});

describe('computed criteria', () => {
  test('are the evaluation’s figures in the criterion’s unit; what cannot be flown counts as worst', async () => {
    const member = await studyWith(db, 'lead');
    const low = await addOrbit(db, {
      member,
      input: OrbitInput.parse({
        name: 'Low',
        perigeeKm: 400,
        apogeeKm: 400,
        inclinationDeg: 5,
        flightsPerYear: 3,
      }),
    });
    await addOrbit(db, {
      member,
      input: OrbitInput.parse({
        name: 'Polar',
        perigeeKm: 500,
        apogeeKm: 500,
        inclinationDeg: 90,
        flightsPerYear: 2,
      }),
    });
    await putVehicle(db, { member, version: 0, input: { vehicle } });
    const [yearly, toLow, deltaV, turn, gain, lowest, unreached] = [
      await add(member, { source: 'computed', quantity: 'payload-per-year' }),
      await add(member, { source: 'computed', quantity: 'payload', orbitId: low.id }),
      await add(member, { source: 'computed', quantity: 'delta-v' }),
      await add(member, { source: 'computed', quantity: 'turn' }),
      await add(member, { source: 'computed', quantity: 'rotation-gain', orbitId: low.id }),
      await add(member, { source: 'computed', quantity: 'lowest-inclination' }),
      await add(member, { source: 'computed', quantity: 'orbits-out-of-reach' }),
    ];
    await put(member, place('Equatorial', 2));
    await put(member, { ...place('Far north', 75), permittedAzimuthsDeg: [[300, 30]] });
    const figures = await readFigures(db, member);
    expect(RankingFigures.safeParse(figures).error).toBeUndefined();
    const [near, north] = evaluateStudy(await loadStudyInputs(db, member.studyId));
    if (!near || !north) throw new Error('two sites were evaluated');
    const cell = (site: number, { id }: { id: string }) =>
      figures.cells[site]?.[figures.criteria.findIndex((criterion) => criterion.id === id)];
    expect(cell(0, yearly)).toBeCloseTo((near.payloadPerYearKg ?? NaN) / 1000, 12);
    expect(cell(0, toLow)).toBe(near.orbits[0]?.payloadKg);
    const totals = near.orbits.map((orbit) => orbit.deltaVMps.total ?? NaN);
    expect(cell(0, deltaV)).toBe(Math.max(...totals));
    expect(cell(0, gain)).toBe(near.orbits[0]?.rotationGainMps);
    expect(cell(0, turn)).toBe(0);
    expect(cell(0, lowest)).toBeCloseTo(near.geocentricLatitudeDeg, 9);
    expect(cell(0, unreached)).toBe(0);

    expect(north.orbits[0]?.way).toBe('out-of-reach');
    expect(cell(1, toLow)).toBe(0);
    expect([cell(1, deltaV), cell(1, turn), cell(1, gain)]).toEqual(['worst', 'worst', 'worst']);
    expect(cell(1, unreached)).toBe(1);
    expect(cell(1, lowest)).toBeGreaterThan(75);
    expect(cell(1, yearly)).toBeCloseTo((2 * (north.orbits[1]?.payloadKg ?? NaN)) / 1000, 9);
    expect(figures.notes).toContainEqual([1, 0, 'O1 counted as 0']);
    expect(figures.notes).toContainEqual([1, 1, 'out of reach']);
    expect(figures.notes).toContainEqual([1, 2, 'O1 out of reach']);

    await weigh(member, Object.fromEntries([yearly, toLow, deltaV, turn, gain].map(({ id }) => [id, 10])));
    const { ranked: rows, incomplete } = await ranked(member);
    expect(incomplete).toEqual([]);
    expect(rows.map(({ name, value }) => [name, Number(value.toFixed(12))])).toEqual([
      ['Equatorial', 0.4],
      ['Far north', 0],
    ]);
  });

  test('without a vehicle payload is missing, not zero; without orbits every figure of them is', async () => {
    const member = await studyWith(db, 'lead');
    await add(member, { source: 'computed', quantity: 'payload-per-year' });
    await add(member, { source: 'computed', quantity: 'delta-v' });
    await put(member, place('Equatorial', 2));
    expect((await readFigures(db, member)).cells).toEqual([[null, null]]);
    const input = OrbitInput.parse({ perigeeKm: 400, apogeeKm: 400, inclinationDeg: 51.6 });
    await addOrbit(db, { member, input });
    const { cells, notes } = await readFigures(db, member);
    expect(cells[0]?.[0]).toBeNull();
    expect(cells[0]?.[1]).toBeGreaterThan(7000);
    expect(notes).toEqual([[0, 0, 'no vehicle yet']]);
  });
});

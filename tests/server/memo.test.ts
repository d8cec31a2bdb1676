import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { CriterionInput, type CriterionDraft } from '#contract/criterion.ts';
import { evaluate } from '#contract/flights.ts';
import { EvaluateInput } from '#contract/evaluate.ts';
import type { MemoModel, MemoTable } from '#contract/memo.ts';
import { OrbitInput } from '#contract/requirement.ts';
import { SiteInput, type SiteDraft } from '#contract/site.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import { addGroup } from '#server/criteria/groups/add-group.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import type { Member } from '#server/member.ts';
import { sensitivityBytes } from '#contract/sensitivity-model.ts';
import type { RunSensitivity } from '#server/ranking/read-sensitivity.ts';
import { buildMemo } from '#server/memo/build-memo.ts';
import { loadPreview } from '#server/memo/load-preview.ts';
import { outstandingInWords } from '#server/memo/outstanding.ts';
import { respondWithInputs } from '#server/memo/respond.ts';
import { readRanking } from '#server/ranking/read-ranking.ts';
import { addOrbit } from '#server/requirement/add-orbit.ts';
import { putVehicle } from '#server/requirement/change-vehicle.ts';
import { addSite } from '#server/sites/add-site.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();
const now = new Date('2026-12-01T23:30:00Z');

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

/** A study with two sites, one orbit, a vehicle, a computed and an entered criterion, and weights. */
async function smallStudy(): Promise<Member> {
  const member = await studyWith(db, 'lead');
  await putVehicle(db, { member, version: 0, input: { vehicle } });
  await addOrbit(db, {
    member,
    input: OrbitInput.parse({
      code: 'STN',
      name: 'Station',
      perigeeKm: 420,
      apogeeKm: 420,
      inclinationDeg: 51.6,
      flightsPerYear: 4,
    }),
  });
  const payload = await add(member, { source: 'computed', quantity: 'payload-per-year' });
  const cost = await add(member, { source: 'entered', name: 'Cost', unit: 'M€', direction: 'less' });
  await put(member, {
    name: 'North Holm',
    latitudeDeg: 48.5,
    longitudeDeg: -3.2,
    values: { [cost.id]: 300 },
  });
  await put(member, {
    name: 'South Ness',
    latitudeDeg: -12.25,
    longitudeDeg: 177.5,
    values: { [cost.id]: 260 },
  });
  await saveWeights(db, {
    member,
    weights: 'study',
    version: 0,
    input: { points: { [payload.id]: 60, [cost.id]: 40 } },
  });
  return member;
}

/** The draws, made here and not in a thread: a fresh clone has built none yet. */
const inPlace: RunSensitivity = (task) => Promise.resolve(sensitivityBytes(task));

const memo = (member: Member, paper: 'a4' | 'letter' = 'a4'): Promise<MemoModel> =>
  buildMemo(db, { ...member, paper, now }, inPlace);
const tablesOf = ({ sections }: MemoModel): MemoTable[] =>
  sections.flatMap(({ blocks }) => blocks.flatMap((block) => (block.kind === 'table' ? [block] : [])));
const rowsOf = (model: MemoModel, caption: RegExp): string[][] =>
  tablesOf(model)
    .find((table) => caption.test(table.caption))
    ?.rows.map(({ cells }) => cells.map(({ text }) => text)) ?? [];

describe('a study’s memo', () => {
  test('prints the ranking that the screens show, under the study’s weights', async () => {
    const member = await smallStudy();
    const model = await memo(member);
    const ranking = await readRanking(db, { ...member, weights: 'study' });
    const [first] = ranking.ranked;
    expect(model.finding).toBe(`Fly from ${first?.name}`);
    expect(rowsOf(model, /^The candidates, ranked/).map(([rank, name]) => [rank, name])).toEqual(
      ranking.ranked.map(({ rank, name }) => [String(rank), name]),
    );
    expect(model.titleBlock).toMatchObject({ revision: ranking.revision, date: '2026-12-01', memo: 'Draft' });
  });

  test('is the same model the same day, whoever asks, and another the next day', async () => {
    const member = await smallStudy();
    const model = await memo(member);
    expect(
      await buildMemo(
        db,
        { ...member, userId: 'someone else', paper: 'a4', now: new Date('2026-12-01T00:00:00Z') },
        inPlace,
      ),
    ).toEqual(model);
    const next = await buildMemo(
      db,
      { ...member, paper: 'a4', now: new Date('2026-12-02T00:00:00Z') },
      inPlace,
    );
    expect(next.titleBlock.date).toBe('2026-12-02');
  });

  test.each(['no sites', 'nothing at all'])('says in words what is missing: %s', async (kind) => {
    const member = kind === 'no sites' ? await studyWith(db, 'lead') : await studyWith(db, 'engineer');
    if (kind === 'no sites') await putVehicle(db, { member, version: 0, input: { vehicle } });
    const preview = await loadPreview(db, { ...member, paper: 'a4', now }, inPlace);
    expect(preview.model.finding).toBe('No recommendation: the study has no candidate sites yet');
    expect(preview.outstanding.map(({ text }) => text)).toContain('there are no candidate sites');
    expect(outstandingInWords(preview.outstanding)?.lead).toMatch(/^(Four|Five) things to settle first:$/);
  });
});

describe('the inputs', () => {
  const inputsOf = async (member: Member) => {
    const answer = await respondWithInputs(db, member);
    return { text: await answer.text(), checksum: answer.headers.get('x-checksum-sha256') };
  };
  const printed = async (member: Member): Promise<string> =>
    (await memo(member)).sections
      .flatMap(({ blocks }) => blocks)
      .flatMap((block) => (block.kind === 'code' && block.label.startsWith('Checksum') ? [block.text] : []))
      .join();

  test('are served byte for byte as they were hashed, and the memo prints that checksum', async () => {
    const member = await smallStudy();
    const { text, checksum } = await inputsOf(member);
    expect(createHash('sha256').update(text).digest('hex')).toBe(checksum);
    expect(await printed(member)).toBe(checksum);
  });

  test('are canonical: keys in order and no space (RFC 8785)', async () => {
    const { text } = await inputsOf(await smallStudy());
    const ordered = (value: unknown): unknown =>
      Array.isArray(value)
        ? value.map(ordered)
        : value !== null && typeof value === 'object'
          ? Object.fromEntries(
              Object.entries(value)
                .sort(([a], [b]) => (a < b ? -1 : 1))
                .map(([k, v]) => [k, ordered(v)]),
            )
          : value;
    expect(JSON.stringify(ordered(JSON.parse(text)))).toBe(text);
  });

  test('depend on what figures follow from and on nothing else', async () => {
    const one = await smallStudy();
    const other = await smallStudy();
    expect((await inputsOf(one)).checksum).toBe((await inputsOf(other)).checksum);
    await put(other, { name: 'Third Bank', latitudeDeg: 5, longitudeDeg: 5 });
    expect((await inputsOf(one)).checksum).not.toBe((await inputsOf(other)).checksum);
  });

  test('tell shape, group, steps, what is known of figures and how the weights were said, by name', async () => {
    const member = await smallStudy();
    const { id: groupId } = await addGroup(db, { member, name: 'Ground' });
    const road = await add(member, { source: 'rating', name: 'Road', groupId });
    const wind = await add(member, {
      source: 'entered',
      name: 'Wind',
      direction: 'less',
      groupId,
      shape: { kind: 'exponential', curvature: 2 },
    });
    await put(member, {
      name: 'Third Bank',
      latitudeDeg: 5,
      longitudeDeg: 5,
      values: { [wind.id]: 12 },
      particulars: { [wind.id]: { low: 10, high: 15, source: 'Mast, one year', confidence: 'high' } },
    });
    await saveWeights(db, {
      member,
      weights: 'study',
      version: 1,
      input: { method: 'points', points: { [groupId]: 40, [road.id]: 30, [wind.id]: 10 } },
    });
    const inputs = JSON.parse((await inputsOf(member)).text) as {
      criteria: { name: string }[];
      weights: unknown;
      particulars: Record<string, unknown>;
    };
    expect(inputs.criteria.filter(({ name }) => name === 'Road' || name === 'Wind')).toMatchObject([
      { group: 'Ground', steps: ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'] },
      { group: 'Ground', steps: null, shape: { kind: 'exponential', curvature: 2 } },
    ]);
    expect(inputs.weights).toEqual({
      method: 'points',
      points: [
        { of: { criterion: 'Road' }, points: 30 },
        { of: { criterion: 'Wind' }, points: 10 },
        { of: { group: 'Ground' }, points: 40 },
      ],
    });
    expect(Object.values(inputs.particulars)).toContainEqual({
      Wind: { low: 10, high: 15, source: 'Mast, one year', confidence: 'high' },
    });
  });

  test('hold an evaluation that can be posted as it is and gives the printed figures', async () => {
    const member = await smallStudy();
    const { text } = await inputsOf(member);
    const input = EvaluateInput.parse((JSON.parse(text) as { evaluate: unknown }).evaluate);
    const totals = new Map(
      evaluate(input).map((site, at) => [input.sites[at]?.name, site.orbits[0]?.deltaVMps.total]),
    );
    const rows = rowsOf(await memo(member), /^Δv to STN/);
    expect(rows).toHaveLength(2);
    for (const row of rows) {
      const total = Number(row[9]?.replaceAll(',', ''));
      expect(Math.abs(total - (totals.get(row[0]) ?? NaN))).toBeLessThanOrEqual(0.5);
    }
  });
});

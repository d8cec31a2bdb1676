import { expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { Sensitivity, SensitivityQuery } from '#contract/sensitivity.ts';
import { sensitivityBytes, sensitivityOf } from '#contract/sensitivity-model.ts';
import { SiteInput } from '#contract/site.ts';
import { pointsStatement } from '#contract/weights.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { readFigures } from '#server/ranking/read-ranking.ts';
import { respondWithSensitivity, type RunSensitivity } from '#server/ranking/read-sensitivity.ts';
import { addSite } from '#server/sites/add-site.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

/** What the thread does, without the thread. */
const inPlace: RunSensitivity = (task) => Promise.resolve(sensitivityBytes(task));

test('a study’s sensitivity is that of its figures and the weights asked for, to the last digit', async () => {
  const member = await studyWith(db, 'lead');
  const entered = (name: string, direction: 'more' | 'less', worst: number, best: number) =>
    addCriterion(db, {
      member,
      input: CriterionInput.parse({
        source: 'entered',
        name,
        direction,
        levels: { mode: 'fixed', worst, best },
      }),
    });
  const cost = await entered('Cost', 'less', 400, 200);
  const days = await entered('Launch days', 'more', 100, 300);
  const put = (name: string, latitudeDeg: number, figures: [number, number], low?: number) =>
    addSite(db, {
      member,
      input: SiteInput.parse({
        name,
        latitudeDeg,
        longitudeDeg: 10,
        values: { [cost.id]: figures[0], [days.id]: figures[1] },
        particulars: low === undefined ? {} : { [cost.id]: { low } },
      }),
    });
  await put('Near', 1, [250, 200], 230);
  await put('Far', 2, [300, 300]);
  await saveWeights(db, {
    member,
    weights: 'study',
    version: 0,
    input: { points: { [cost.id]: 60, [days.id]: 40 } },
  });
  await saveWeights(db, {
    member,
    weights: 'mine',
    version: 0,
    input: { points: { [cost.id]: 90, [days.id]: 10 } },
  });

  const ask = async (query: Record<string, string>) => {
    const answer = await respondWithSensitivity(
      db,
      { ...member, query: SensitivityQuery.parse({ samples: '500', ...query }) },
      inPlace,
    );
    expect(answer.headers.get('content-type')).toBe('application/json');
    return Sensitivity.parse(await answer.json());
  };
  const study = await ask({});
  expect(study.sites.map(({ name }) => name)).toEqual(['Far', 'Near']);
  expect(study.tornado?.bars).toHaveLength(1);
  expect((await ask({ weights: 'mine' })).sites.map(({ name }) => name)).toEqual(['Near', 'Far']);

  // What a browser makes of the same figures and weights.
  const figures = await readFigures(db, member);
  const model = rankFigures(prepareFigures(figures), pointsStatement({ [cost.id]: 60, [days.id]: 40 }));
  const { weights, ...query } = SensitivityQuery.parse({ samples: '500' });
  expect(study).toEqual(sensitivityOf(model, weights, query));
});

test.each([
  [{ samples: '0' }, /Samples run from 1 to 100,000/],
  [{ band: '1.5' }, /A band lies between 0 and 1/],
  [{ seed: '0.5' }, /A seed is a whole number/],
  [{ model: 'box' }, /./],
])('refuses %j', (query, words) => {
  const { error } = SensitivityQuery.safeParse(query);
  expect(error?.issues[0]?.message).toMatch(words);
});

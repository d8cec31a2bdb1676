import { describe, expect, test } from 'vitest';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { rowOf } from '#contract/ranking-rows.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import { pointsStatement } from '#contract/weights.ts';
import {
  applyWhatIf,
  countIgnored,
  hasMoved,
  heldParticulars,
  NO_CHANGES,
  rankMoves,
  shownMoves,
} from '#contract/what-if-model.ts';
import type { WhatIfChanges } from '#contract/what-if.ts';
import { COST, criteria, DAYS, four, trialFigures } from '#tests/components/ranking/trial.ts';

/* Expected values are worked out by hand: cost runs from 400 (0) to 200 (1), launch days from 100 (0) to 300 (1). */

const STUDY = pointsStatement({ [COST]: 60, [DAYS]: 40 });
const GONE = '00000000-0000-7000-8000-00000000dead';
const idOf = (figures: RankingFigures, name: string): string =>
  figures.sites.find((site) => site.name === name)?.siteId ?? '';
const tried = (name: string, criterionId: string, value: number | null) => ({
  siteId: idOf(four, name),
  criterionId,
  value,
});

function tryOut(changes: Partial<WhatIfChanges>, figures = four) {
  const applied = applyWhatIf(figures, STUDY, { ...NO_CHANGES, ...changes });
  const model = rankFigures(prepareFigures(applied.figures), applied.statement);
  const rows = model.rows.map((listed) => rowOf(model, listed));
  return { applied, model, rows };
}
const inWords = (rows: ReturnType<typeof tryOut>['rows']): string[] =>
  rows.map((row) =>
    row.kind === 'set-aside' ? `${row.name} aside` : `${row.name} ${row.kind} ${row.value.toFixed(4)}`,
  );

describe('a what-if applied', () => {
  test('without changes is the study', () => {
    const { applied, rows } = tryOut({});
    expect(applied.figures).toEqual(four);
    expect(countIgnored(applied.ignored)).toBe(0);
    expect(inWords(rows).slice(0, 2)).toEqual(['Far ranked 0.7000', 'Near ranked 0.6500']);
  });

  test('weighs anew', () => {
    const { rows } = tryOut({ weights: pointsStatement({ [COST]: 100, [DAYS]: 0 }) });
    expect(inWords(rows).slice(0, 2)).toEqual(['Near ranked 0.7500', 'Far ranked 0.5000']);
  });

  test('tightens and lifts a limit', () => {
    expect(inWords(tryOut({ limits: { [COST]: { kind: 'at-most', value: 290 } } }).rows)).toContain(
      'Far aside',
    );
    // (400 − 395.5) / 200 × 0.6 + 1 × 0.4
    expect(inWords(tryOut({ limits: { [COST]: null } }).rows)).toContain('Dear ranked 0.4135');
  });

  test('tries a figure, a missing one too, and tries to be without one', () => {
    // (400 − 220) / 200 × 0.6 + 0.5 × 0.4
    expect(inWords(tryOut({ figures: [tried('Near', COST, 220)] }).rows)[0]).toBe('Near ranked 0.7400');
    // (400 − 210) / 200 × 0.6 + 0.8 × 0.4
    expect(inWords(tryOut({ figures: [tried('=Unknown', COST, 210)] }).rows)[0]).toBe(
      '=Unknown ranked 0.8900',
    );
    expect(inWords(tryOut({ figures: [tried('Far', COST, null)] }).rows)).toContain('Far incomplete 0.4000');
  });

  test('leaves a site out, and levels from the candidates follow', () => {
    const [cost, days] = criteria;
    if (!cost || !days) throw new Error('no criteria');
    const follow = { ...cost, levels: { mode: 'candidates' as const }, limit: null };
    const figures = trialFigures(
      [
        { name: 'Near', cells: [250, 200] },
        { name: 'Far', cells: [300, 300] },
        { name: 'Dear', cells: [350, 300] },
      ],
      { criteria: [follow, days] },
    );
    // Near is the cheapest: of 250 to 350, then alone of 300 to 350 Far is.
    expect(inWords(tryOut({}, figures).rows)).toEqual([
      'Near ranked 0.8000',
      'Far ranked 0.7000',
      'Dear ranked 0.4000',
    ]);
    expect(inWords(tryOut({ leftOut: [idOf(figures, 'Near')] }, figures).rows)).toEqual([
      'Far ranked 1.0000',
      'Dear ranked 0.4000',
    ]);
  });

  test('words, particulars and evidence stay with their sites, and bounds that no longer hold fall away', () => {
    const figures = trialFigures(
      [
        { name: 'Near', cells: [250, 200] },
        { name: 'Far', cells: ['worst', 300] },
        { name: 'Dear', cells: [350, 300] },
      ],
      {
        notes: [[1, 0, 'out of reach']],
        particulars: [
          [0, 0, { low: 240, high: 260 }],
          [2, 0, { low: 340, high: 360, source: 'Survey' }],
        ],
        evidence: [[2, 1, 3]],
      },
    );
    const dear = { siteId: idOf(figures, 'Dear'), criterionId: COST, value: 361 };
    const { applied } = tryOut({ leftOut: [idOf(figures, 'Near')], figures: [dear] }, figures);
    expect(applied.figures).toMatchObject({
      cells: [
        ['worst', 300],
        [361, 300],
      ],
      notes: [[0, 0, 'out of reach']],
      particulars: [[1, 0, { low: 340, source: 'Survey' }]],
      evidence: [[1, 1, 3]],
    });
    expect(applied.figures.particulars[0]?.[2]).not.toHaveProperty('high');
    expect(figures.cells[2]?.[0]).toBe(350);
  });

  test('ignores and names what has gone, and what came since has no weight in it', () => {
    const { applied, rows } = tryOut({
      weights: pointsStatement({ [COST]: 50, [GONE]: 50 }),
      limits: { [GONE]: null },
      figures: [
        { siteId: GONE, criterionId: COST, value: 1 },
        { siteId: idOf(four, 'Near'), criterionId: GONE, value: 1 },
      ],
      leftOut: [GONE],
    });
    expect(applied.ignored).toMatchObject({ weights: [GONE], limits: [GONE], leftOut: [GONE] });
    expect(countIgnored(applied.ignored)).toBe(5);
    expect(applied.unweighed).toEqual([DAYS]);
    expect(inWords(rows)[0]).toBe('Near ranked 0.7500');
  });

  test('tries no figure of a computed criterion', () => {
    const [cost, days] = criteria;
    if (!cost || !days) throw new Error('no criteria');
    const figures = trialFigures([{ name: 'Near', cells: [250, 200] }], {
      criteria: [{ ...cost, source: 'computed', quantity: 'turn' }, days],
    });
    const { applied } = tryOut(
      { figures: [{ siteId: idOf(figures, 'Near'), criterionId: COST, value: 1 }] },
      figures,
    );
    expect(applied.figures.cells).toEqual([[250, 200]]);
    expect(applied.ignored.figures).toHaveLength(1);
  });
});

test.each([
  [250, ['low', 'high'], []],
  [239, ['high'], ['low']],
  [240, ['low', 'high'], []],
  [261, ['low'], ['high']],
  [null, [], ['low', 'high']],
])('of low 240 and high 260 beside %s these stay: %s', (value, stay, dropped) => {
  const held = heldParticulars(value, { low: 240, high: 260, source: 'Survey' });
  expect(Object.keys(held.kept ?? {}).filter((part) => part !== 'source')).toEqual(stay);
  expect(held.dropped).toEqual(dropped);
});

describe('rank moves', () => {
  test('tell where each site stood and stands', () => {
    const before = tryOut({}).model;
    const { model: after } = tryOut({
      limits: { [COST]: { kind: 'at-most', value: 290 } },
      leftOut: [idOf(four, 'Dear')],
    });
    const moves = rankMoves(before, after);
    expect(moves.map(({ name, before: b, after: a }) => [name, b.kind, a.kind])).toEqual([
      ['Far', 'ranked', 'set-aside'],
      ['Near', 'ranked', 'ranked'],
      ['=Unknown', 'incomplete', 'incomplete'],
      ['Dear', 'set-aside', 'left-out'],
    ]);
    expect(moves[1]).toMatchObject({ before: { rank: 2 }, after: { rank: 1 }, risen: 1, afterPlace: 0 });
    expect(moves[3]).toMatchObject({ afterPlace: null, risen: 0 });
    expect(moves.filter(hasMoved)).toHaveLength(4);
    expect(rankMoves(before, before).filter(hasMoved)).toEqual([]);
  });

  test('of five thousand sites the first twelve of either order are drawn, and the six that moved most', () => {
    const many = trialFigures(
      Array.from({ length: 5_000 }, (_, at) => ({ name: `S${at}`, cells: [200 + at / 50, 100] })),
    );
    const before = tryOut({}, many).model;
    const figures = [
      { siteId: idOf(many, 'S4000'), criterionId: COST, value: 200.01 },
      { siteId: idOf(many, 'S1000'), criterionId: COST, value: 240.01 },
    ];
    const shown = shownMoves(rankMoves(before, tryOut({ figures }, many).model)).map(({ name }) => name);
    const first = Array.from({ length: 12 }, (_, at) => `S${at}`);
    expect(shown.slice(0, 12)).toEqual(first);
    expect(shown).toContain('S4000');
    expect(shown).toContain('S1000');
    expect(shown.length).toBeLessThanOrEqual(12 + 12 + 6);
  });
});

import fc from 'fast-check';
import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test, vi } from 'vitest';
import { acceptabilityCsv } from '#components/ranking/acceptability/acceptability-csv.ts';
import { RankMatrix } from '#components/ranking/acceptability/RankMatrix.tsx';
import { StackedRanks } from '#components/ranking/acceptability/StackedRanks.tsx';
import { sheetOf } from '#components/ranking/columns.ts';
import { boutOf } from '#components/ranking/compare/head-to-head.ts';
import CompareView from '#components/ranking/compare/CompareView.tsx';
import { placeLabels, scatterPoints } from '#components/ranking/compare/scatter.ts';
import HoldsView from '#components/ranking/holds/HoldsView.tsx';
import type { RankingViewProps } from '#components/ranking/views.ts';
import { presentRanking, rowOf } from '#contract/ranking-rows.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import { DrawQuery, MOST_DRAWN_SITES } from '#contract/sensitivity.ts';
import {
  acceptabilityOf,
  acceptabilityQuestionOf,
  presentAcceptability,
} from '#contract/sensitivity-model.ts';
import { subjectOf } from '#contract/sensitivity-subject.ts';
import { namesOf } from '#contract/sensitivity-words.ts';
import { acceptabilityRun } from '#core/decision/acceptability.ts';
import { COST, criteria, DAYS, four, trialFigures, trialModel } from './trial.ts';

vi.stubGlobal('location', new URL('https://spinward.example.org/studies/x/ranking'));

const textOf = (node: ReactElement): string =>
  renderToStaticMarkup(node)
    .replace(/<[^>]+>/g, ' ')
    .replace(/\s+/g, ' ')
    .replaceAll('&#x27;', '’');

const propsOf = (model: RankingModel): RankingViewProps => {
  const ranking = presentRanking(model, 'study');
  return {
    studyId: 'x',
    title: 'Trial',
    model,
    sheet: sheetOf(ranking, model),
    whose: 'study',
    viewer: { role: 'lead', state: 'draft', archived: false },
    // These views read the model alone.
    live: { ranking, model } as RankingViewProps['live'],
  };
};

describe('head to head', () => {
  test('says who stands above whom, and what speaks for either', () => {
    const text = textOf(<CompareView {...propsOf(trialModel())} />);
    // Far 0.3 + 0.4, Near 0.45 + 0.2.
    expect(text).toContain(
      'Far stands 0.050 above Near. For Far: Launch days +0.200. For Near: Cost −0.150.',
    );
    expect(text.indexOf('Launch days days')).toBeGreaterThan(0);
    expect(text.indexOf('Launch days days')).toBeLessThan(text.indexOf('Cost M€'));
  });

  test('printed terms add up to printed totals, and printed differences come out both ways', () => {
    const figure = fc.double({ min: 100, max: 400, noNaN: true });
    fc.assert(
      fc.property(
        fc.array(fc.tuple(figure, figure), { minLength: 2, maxLength: 4 }),
        fc.tuple(fc.integer({ min: 1, max: 100 }), fc.integer({ min: 1, max: 100 })),
        (cells, [a, b]) => {
          const model = trialModel(trialFigures(cells.map((row, at) => ({ name: `S${at}`, cells: row }))), {
            [COST]: a,
            [DAYS]: b,
          });
          const rows = model.rows.map((listed) => rowOf(model, listed));
          const bout = boutOf(
            model,
            rows,
            model.rows.map(({ site }) => site),
            3,
          );
          const steps = (value: number): number => Math.round(value * 10 ** bout.decimals);
          const sum = (parts: readonly number[]): number => parts.reduce((so, part) => so + steps(part), 0);
          bout.terms.forEach((terms, at) => expect(sum(terms)).toBe(steps(bout.totals[at] ?? 0)));
          bout.differences.forEach((differences, at) => {
            expect(sum(differences)).toBe(steps(bout.margins[at] ?? 0));
            differences.forEach((difference, j) =>
              expect(steps(difference)).toBe(
                steps(bout.terms[0]?.[j] ?? 0) - steps(bout.terms[at + 1]?.[j] ?? 0),
              ),
            );
          });
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('two criteria against each other', () => {
  const figures = trialFigures([
    { name: 'Cheap', cells: [220, 120] },
    { name: 'Calm', cells: [380, 290] },
    { name: 'Middle', cells: [300, 250] },
    { name: 'Poor', cells: [320, 180] },
    { name: 'Blank', cells: [null, 250] },
    { name: 'Dear', cells: [395, 299] },
  ]);

  test('the edge is of ranked sites that none outdoes on both; others are apart', () => {
    const { points, edge, unplaced } = scatterPoints(trialModel(figures), 0, 1);
    expect(edge.map(({ name }) => name)).toEqual(['Cheap', 'Middle', 'Calm']);
    expect(unplaced).toBe(1);
    expect(points.find(({ name }) => name === 'Poor')?.standing).toBe('ranked');
    expect(points.find(({ name }) => name === 'Dear')?.standing).toBe('apart');
  });

  test('names stand clear of each other and within the frame', () => {
    const frame = { left: 0, right: 300, top: 0, bottom: 200 };
    const crowd = Array.from({ length: 24 }, (_, at) => ({
      siteId: String(at),
      name: `Candidate ${at}`,
      standing: 'ranked' as const,
      onEdge: at < 5,
      px: 20 + ((at * 37) % 260),
      py: 15 + ((at * 53) % 170),
    }));
    const boxes = placeLabels(crowd, frame).map(({ name, x, y, anchor }) => {
      const width = name.length * 6.6;
      const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
      return { left, right: left + width, top: y - 11, bottom: y + 3 };
    });
    expect(boxes.length).toBeGreaterThan(3);
    boxes.forEach((a, at) => {
      expect(a.left >= 0 && a.right <= 300 && a.top >= 0 && a.bottom <= 200).toBe(true);
      for (const b of boxes.slice(at + 1))
        expect(a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom).toBe(false);
    });
  });
});

describe('what would change the leader', () => {
  test('the weight, and to whom', () => {
    const text = textOf(<HoldsView {...propsOf(trialModel())} />);
    expect(text).toContain('Nearest change: Cost from 0.600 to 0.667, where Near leads');
    expect(text).toContain('Now 0.400. Below 0.333 Near leads.');
    expect(text).toContain('No figure has a low and a high.');
  });

  test('where none does, that is said of each criterion', () => {
    const clear = trialFigures([
      { name: 'Best', cells: [210, 290] },
      { name: 'Worse', cells: [300, 200] },
    ]);
    const text = textOf(<HoldsView {...propsOf(trialModel(clear))} />);
    expect(text).toContain('No weight alone changes the leader');
    expect(text).toContain('No weight on Cost changes the leader.');
    expect(text).toContain('No weight on Launch days changes the leader.');
  });

  const withRanges = (particulars: RankingFigures['particulars']) =>
    textOf(<HoldsView {...propsOf(trialModel({ ...four, particulars }))} />);

  test('a figure that costs the lead is counted and marked as lost', () => {
    // Near at 230 M€: 0.71 against 0.70.
    const text = withRanges([[0, 0, { low: 230, high: 270 }]]);
    expect(text).toContain('1 figure alone can cost Far the lead');
    expect(text).toContain('230.0 250.0 270.0 −0.010 +0.110 lost');
  });

  test('a figure that leaves the lead is said to', () => {
    expect(withRanges([[0, 0, { low: 245, high: 270 }]])).toContain('No figure alone costs Far the lead');
  });

  test('one ranked site has no lead to lose', () => {
    const one = trialFigures([{ name: 'Lone', cells: [250, 200] }]);
    expect(textOf(<HoldsView {...propsOf(trialModel(one))} />)).toContain('One site alone is ranked.');
  });
});

describe('rank acceptability', () => {
  const uncertain = trialModel({ ...four, particulars: [[0, 0, { low: 230, high: 290 }]] });
  const query = { ...DrawQuery.parse({}), samples: 2_000 };
  const answer = acceptabilityOf(uncertain, query);
  const names = namesOf(four.sites, criteria);

  test('drawn in steps, as the browser does, it is the server’s to the last digit', () => {
    const subject = subjectOf(uncertain, MOST_DRAWN_SITES);
    if (!subject) throw new Error('nothing is ranked');
    const run = acceptabilityRun(acceptabilityQuestionOf(subject, query));
    while (!run.step(37));
    expect(presentAcceptability(subject, query, run.result(), 0)).toEqual(answer);
  });

  test('the matrix prints each share with its standard error, and a share of none as such', () => {
    if (!answer) throw new Error('nothing was drawn');
    const text = textOf(<RankMatrix answer={answer} names={names} />);
    const share = answer.sites[0]?.shares[0] ?? 0;
    expect(text).toContain(
      `${(share * 100).toFixed(1)} standard error ${(100 * Math.sqrt((share * (1 - share)) / 2_000)).toFixed(2)}`,
    );
    const sure = acceptabilityOf(trialModel(four, { [COST]: 1, [DAYS]: 9 }), { ...query, band: 0.1 });
    if (!sure) throw new Error('nothing was drawn');
    expect(textOf(<RankMatrix answer={sure} names={names} />)).toContain(
      '100.0 standard error under 1/2,000 · under 1/2,000',
    );
  });

  test('the stacked bars say the shares of first rank', () => {
    if (!answer) throw new Error('nothing was drawn');
    const html = renderToStaticMarkup(<StackedRanks answer={answer} names={names} />);
    expect(html).toContain(`At rank 1: Far ${((answer.sites[0]?.shares[0] ?? 0) * 100).toFixed(1)} %`);
  });

  test('the file holds how it was drawn, and every share in full', () => {
    if (!answer) throw new Error('nothing was drawn');
    const lines = acceptabilityCsv(answer, four.sites, criteria).split('\r\n');
    expect(lines[0]).toBe(
      'weight_model,band,samples,seed,code,name,share_at_rank_1,share_at_rank_2,standard_error_at_rank_1,standard_error_at_rank_2,confidence,confidence_standard_error,"Cost, central weight","Launch days, central weight",share_above_FA,share_above_NE',
    );
    const cells = lines[1]?.split(',') ?? [];
    expect(cells.slice(0, 8)).toEqual([
      'band',
      '0.5',
      '2000',
      '1',
      'FA',
      'Far',
      String(answer.sites[0]?.shares[0]),
      String(answer.sites[0]?.shares[1]),
    ]);
    expect(Number(cells[12]) + Number(cells[13])).toBeCloseTo(1, 12);
    expect(cells[14]).toBe('');
  });
});

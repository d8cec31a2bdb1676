import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { sheetOf } from '#components/ranking/columns.ts';
import { Contributions } from '#components/ranking/Contributions.tsx';
import { rankingCsv } from '#components/ranking/export.ts';
import { compareFigures, gridLines, keepGroups } from '#components/ranking/grid-rows.ts';
import { RankingList } from '#components/ranking/RankingList.tsx';
import { RankingTable } from '#components/ranking/RankingTable.tsx';
import { lockOf } from '#components/ranking/viewer.ts';
import { presentRanking, rowsOf } from '#contract/ranking-rows.ts';
import type { IRowNode } from 'ag-grid-community';
import type { GridLine } from '#components/ranking/grid-rows.ts';
import { COST, DAYS, four, trialFigures, trialModel } from './trial.ts';

const model = trialModel();
const ranking = presentRanking(model, 'study');
const sheet = sheetOf(ranking, model);
const textOf = (html: string): string =>
  html
    .replace(/<[^>]+>/g, ' ')
    .replace(/\s+/g, ' ')
    .replaceAll('&#x27;', '’')
    .trim();

describe('the drawn table and list', () => {
  const table = renderToStaticMarkup(<RankingTable sheet={sheet} chosen="NE" />);
  const list = renderToStaticMarkup(<RankingList sheet={sheet} rows={rowsOf(ranking)} chosen={null} />);

  test.each([
    ['table', table],
    ['list', list],
  ])('the %s carries no style attribute, which the policy would block', (_, html) => {
    expect(html).not.toContain('style=');
  });

  test('the table says who leads, what is missing and what failed, in that order', () => {
    const text = textOf(table);
    const places = [
      'Leads',
      'Near',
      'Incomplete',
      'Set aside: each fails a must-meet limit.',
      'Cost 395.5 M€, limit ≤ 390',
    ];
    const at = places.map((words) => text.indexOf(words));
    expect(at.every((place) => place >= 0)).toBe(true);
    expect([...at].sort((a, b) => a - b)).toEqual(at);
    expect(table.match(/data-lead/g)).toHaveLength(1);
    expect(table.match(/data-chosen/g)).toHaveLength(1);
    expect(text).toContain('no figure');
  });

  test('each bar is named with its value and its terms', () => {
    expect(table).toContain('aria-label="Overall value 0.700: Cost 0.300, Launch days 0.400"');
    expect(table).toContain('aria-label="Overall value 0.320 to 0.920: Cost no figure, Launch days 0.320"');
  });

  test('the list opens the first site’s terms: figure, unit, value × weight', () => {
    expect(textOf(list)).toContain('A Cost 300.0 M€ .500 × .60');
    expect(list.match(/<details open/g)).toHaveLength(1);
  });

  test('words stand where nothing can be flown', () => {
    const out = trialModel(
      trialFigures([{ name: 'Polar', cells: ['worst', 200] }], { notes: [[0, 0, 'out of reach']] }),
      {
        [COST]: 0,
        [DAYS]: 1,
      },
    );
    const shown = presentRanking(out, 'study');
    expect(shown.setAside[0]?.reasons[0]?.message).toBe('Cost out of reach, limit ≤ 390');
    expect(
      textOf(renderToStaticMarkup(<RankingTable sheet={sheetOf(shown, out)} chosen={null} />)),
    ).toContain('out of reach');
  });
});

test('the terms of a site are printed so that they add up, and the weights to 1', () => {
  const third = trialModel(four, { [COST]: 2, [DAYS]: 1 });
  const shown = sheetOf(presentRanking(third, 'study'), third);
  const weights = shown.columns.map(({ weight, weightDecimals }) => Number(weight.toFixed(weightDecimals)));
  expect(weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1, 12);
  const [row] = rowsOf(shown.ranking);
  if (!row) throw new Error('no row');
  const text = textOf(renderToStaticMarkup(<Contributions row={row} sheet={shown} studyId="s" />));
  const terms = [...text.matchAll(/0\.\d+ (0\.\d+)(?= [AB] |(?: Overall))/g)].map(([, term]) => Number(term));
  const total = Number(/Overall value (\d\.\d+)/.exec(text)?.[1]);
  expect(terms).toHaveLength(2);
  expect(terms.reduce((sum, term) => sum + term, 0)).toBeCloseTo(total, 9);
});

describe('the export', () => {
  const ids = model.rows.map(({ site }) => four.sites[site]?.siteId ?? '');
  const lines = rankingCsv(model, ids).trimEnd().split('\r\n');

  test('holds every site asked for in that order, with ranges and reasons', () => {
    expect(lines).toHaveLength(5);
    expect(lines[1]).toMatch(/^ranked,1,1,1,FA,Far,-4\.74,37\.3,0\.7,/);
    expect(lines[3]).toMatch(/^incomplete,,1,3,/);
    expect(lines[4]).toContain('"Cost 395.5 M€, limit ≤ 390"');
    expect(
      rankingCsv(model, [ids[1] ?? ''])
        .trimEnd()
        .split('\r\n'),
    ).toHaveLength(2);
  });

  test('no cell begins like a formula', () => {
    expect(lines[3]).toContain(",'=U,'=Unknown,");
  });
});

describe('the grid’s rows', () => {
  const lines = gridLines(model, true);

  test('the band stands over the set-aside sites', () => {
    expect(lines.map((line) => (line.kind === 'band' ? 'band' : line.listed.kind))).toEqual([
      'ranked',
      'ranked',
      'incomplete',
      'band',
      'set-aside',
    ]);
    expect(gridLines(model, false)).toHaveLength(4);
  });

  test('however it is sorted, incomplete and set-aside sites stay at the bottom', () => {
    const nodes = [...lines].reverse().map((data) => ({ data }) as IRowNode<GridLine>);
    keepGroups(nodes);
    expect(nodes.map(({ data }) => (data?.kind === 'site' ? data.listed.kind : 'band'))).toEqual([
      'ranked',
      'ranked',
      'incomplete',
      'band',
      'set-aside',
    ]);
    expect(nodes.map(({ data }) => data?.kind === 'site' && data.place).slice(0, 2)).toEqual([1, 0]);
  });

  test('a site without a figure comes last whichever way a column is sorted', () => {
    // The grid turns a descending comparison round itself.
    expect(compareFigures(undefined, 3, null, null, false)).toBeGreaterThan(0);
    expect(compareFigures(undefined, 3, null, null, true)).toBeLessThan(0);
    expect(compareFigures(2, 3, null, null, true)).toBeLessThan(0);
  });
});

test('who may weigh what, and why not', () => {
  const at = (role: 'lead' | 'engineer' | 'reviewer' | 'reader', state: 'draft' | 'in-review' = 'draft') => ({
    role,
    state,
    archived: false,
  });
  expect(lockOf(at('lead'), 'study')).toBeUndefined();
  expect(lockOf(at('lead', 'in-review'), 'study')).toMatch(/^In review/);
  expect(lockOf(at('reviewer', 'in-review'), 'mine')).toBeUndefined();
  expect(lockOf(at('engineer'), 'study')).toMatch(/lead/);
  expect(lockOf(at('reader'), 'mine')).toMatch(/reader/i);
  expect(lockOf({ ...at('lead'), archived: true }, 'mine')).toMatch(/archived/);
});

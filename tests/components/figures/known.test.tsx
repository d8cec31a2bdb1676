import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { FigureMarks } from '#components/figures/FigureMarks.tsx';
import { enteredLines, knownAt, knownWords, sourceCount, withEntry } from '#components/figures/known.ts';
import { COST, DAYS, trialFigures } from '#tests/components/ranking/trial.ts';

const figures = trialFigures(
  [
    { name: 'Near', cells: [300, 200] },
    { name: 'Far', cells: [null, 120] },
  ],
  {
    particulars: [
      [0, 0, { low: 250, high: 360, source: 'Port office' }],
      [1, 0, { source: 'left behind' }],
      [1, 1, { confidence: 'low' }],
    ],
    evidence: [
      [0, 0, 2],
      [0, 1, 1],
    ],
  },
);

describe('what is known of figures', () => {
  test('stands with its figure, and nowhere without one', () => {
    expect(knownAt(figures, 0, 0)).toEqual({
      particulars: { low: 250, high: 360, source: 'Port office' },
      files: 2,
    });
    expect(knownAt(figures, 0, 1)).toEqual({ particulars: {}, files: 1 });
    expect(knownAt(figures, 1, 0)).toBeUndefined();
  });

  test('in words, and drawn with them', () => {
    const known = knownAt(figures, 0, 0);
    if (!known) throw new Error('nothing known');
    expect(knownWords(known)).toBe('uncertain, low 250 and high 360; source: Port office; 2 evidence files');
    const drawn = renderToStaticMarkup(<FigureMarks known={known} />);
    expect(drawn.match(/<svg/g)).toHaveLength(3);
    expect(drawn).toContain(', uncertain, low 250 and high 360; source: Port office; 2 evidence files');
    expect(renderToStaticMarkup(<FigureMarks known={{ particulars: {}, files: 0 }} />)).toBe('');
    expect(drawn).not.toContain('style=');
  });
});

test('entered figures are listed and those without a source counted', () => {
  const lines = enteredLines(figures);
  expect(lines.map(({ siteName, criterion, value }) => [siteName, criterion.id, value])).toEqual([
    ['Near', COST, 300],
    ['Near', DAYS, 200],
    ['Far', DAYS, 120],
  ]);
  expect(sourceCount(lines)).toBe('2 of 3 figures have no source.');
  expect(sourceCount(lines.slice(1, 2))).toBe('1 of 1 figure has no source.');
  expect(sourceCount(lines.slice(0, 1))).toBe('The one figure has a source.');
  expect(sourceCount([])).toBe('No figures are entered yet.');
});

test('a saved figure is shown at once, and one taken away goes with what was known of it', () => {
  const at = { siteId: figures.sites[0]?.siteId ?? '', criterionId: COST };
  const saved = withEntry(figures, at, { value: 310, known: { high: 320 } });
  expect([saved.cells[0], knownAt(saved, 0, 0)]).toEqual([
    [310, 200],
    { particulars: { high: 320 }, files: 2 },
  ]);
  const gone = withEntry(saved, at, { value: null, known: {} });
  expect(gone.cells[0]).toEqual([null, 200]);
  expect(gone.particulars.some(([site, place]) => site === 0 && place === 0)).toBe(false);
  expect(withEntry(figures, { siteId: 'none', criterionId: COST }, { value: 1, known: {} })).toBe(figures);
});

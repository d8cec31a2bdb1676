import { describe, expect, test } from 'vitest';
import { entryText, entryWords, readEntry, readStep, spanText } from '#components/figures/figure.ts';
import { readTyped, typedOf } from '#components/figures/figure-form.ts';

const known = { low: 1, high: 2, source: 'Port office' } as const;

describe('a figure typed in its cell', () => {
  test.each([
    ['300', { value: 300, known: { source: 'Port office' } }],
    ['250 / 300 / 360', { value: 300, known: { low: 250, high: 360, source: 'Port office' } }],
    ['−4.5/−4/1,200', { value: -4, known: { low: -4.5, high: 1200, source: 'Port office' } }],
    ['/ 300 / 360', { value: 300, known: { high: 360, source: 'Port office' } }],
    ['250/300/', { value: 300, known: { low: 250, source: 'Port office' } }],
    ['  ', { value: null, known: {} }],
  ])('%s', (text, entry) => {
    const read = readEntry(text, known);
    expect(read).toEqual({ kind: 'read', entry });
    if (read.kind === 'read') expect(readEntry(entryText(read.entry), known)).toEqual(read);
  });

  test.each([
    ['many', '“many” is no number.'],
    ['250 / 300', 'Type a figure'],
    ['1/2/3/4', 'Type a figure'],
    ['250 / / 360', 'Type a figure'],
    ['400 / 300 / 360', 'Low 400 is above the figure, 300.'],
    ['250 / 300 / 290', 'High 290 is below the figure, 300.'],
  ])('%s is refused and says why', (text, words) => {
    const read = readEntry(text, {});
    expect(read.kind === 'refused' && read.message).toContain(words);
  });

  test('a step keeps what is known of it, and is refused where it leaves its low or high behind', () => {
    expect(readStep('2', known)).toEqual({ kind: 'read', entry: { value: 2, known } });
    expect(readStep('', known)).toEqual({ kind: 'read', entry: { value: null, known: {} } });
    expect(readStep('4', known)).toEqual({ kind: 'refused', message: 'High 2 is below the figure, 4.' });
  });
});

test('a figure in words', () => {
  const cost = { unit: 'M€', steps: null };
  expect(entryWords({ value: 1300.5, known: { low: -2 } }, cost)).toBe('1,300.5 (−2 to …) M€');
  expect(entryWords({ value: null, known: {} }, cost)).toBe('no figure');
  const rating = { unit: '', steps: ['a', 'b', 'c', 'd', 'e'] };
  expect(entryWords({ value: 3, known: { low: 2, high: 4 } }, rating)).toBe('d (3) (c (2) to e (4))');
  expect([spanText({ low: 1, high: 2.25 }, 1), spanText({ high: 4 }, 0), spanText({}, 0)]).toEqual([
    '1.0 – 2.3',
    '– 4',
    '',
  ]);
});

describe('a figure’s form', () => {
  const typed = { figure: '300', low: '', high: '', source: '', date: '', confidence: '' };
  const entered = { source: 'entered' } as const;

  test('reads what it wrote', () => {
    const entry = {
      value: 1300,
      known: { low: 1200, high: 1400, source: 'Port office', date: '2026-05-01', confidence: 'low' as const },
    };
    expect(readTyped(typedOf(entry), entered)).toEqual({ kind: 'read', entry });
    const none = { value: null, known: {} };
    expect(readTyped(typedOf(none), entered)).toEqual({ kind: 'read', entry: none });
  });

  test.each([
    [{ figure: 'many' }, 'figure'],
    [{ low: '301' }, 'low'],
    [{ high: '299' }, 'high'],
    [{ date: '2026-02-30' }, 'date'],
    [{ source: 'x'.repeat(501) }, 'source'],
    [{ figure: '', source: 'Port office' }, 'figure'],
  ])('%j is refused at its field', (over, field) => {
    const read = readTyped({ ...typed, ...over }, entered);
    expect(read.kind === 'refused' && read.faults.map((fault) => fault.field)).toEqual([field]);
  });

  test('a rating stands on its steps', () => {
    const read = readTyped({ ...typed, figure: '5' }, { source: 'rating' });
    expect(read).toMatchObject({ kind: 'refused', faults: [{ field: 'figure' }] });
  });
});

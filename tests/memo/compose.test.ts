import { describe, expect, test } from 'vitest';
import type { FlownState } from '#contract/flown-results.ts';
import type { MemoBlock, MemoModel, MemoTable } from '#contract/memo.ts';
import { composeMemo } from '#server/memo/compose.ts';
import { inventedFacts } from './invented.ts';

const tables = ({ sections }: MemoModel): MemoTable[] =>
  sections.flatMap(({ blocks }) =>
    blocks.filter((block): block is MemoTable & MemoBlock => block.kind === 'table'),
  );
const titled = (model: MemoModel, caption: RegExp): MemoTable[] =>
  tables(model).filter((one) => caption.test(one.caption));

/** A printed figure as a whole number of its last digit, so that sums are exact. */
function steps(text: string, decimals: number): bigint {
  const [whole = '', fraction = ''] = text.replace('−', '-').replaceAll(',', '').split('.');
  return BigInt(whole + fraction.padEnd(decimals, '0'));
}
const decimalsOf = (texts: string[]): number =>
  Math.max(...texts.map((text) => text.split('.')[1]?.length ?? 0));

function expectClosed(parts: string[], total: string): void {
  const decimals = decimalsOf([...parts, total]);
  expect(
    parts.reduce((sum, part) => sum + steps(part, decimals), 0n),
    `${parts.join(' + ')} = ${total}`,
  ).toBe(steps(total, decimals));
}

describe('what is printed adds up', () => {
  const model = composeMemo(inventedFacts({ sites: 40, orbits: 6, criteria: 7 }));

  test('every line of every Δv budget', () => {
    const budgets = titled(model, /^Δv to /);
    expect(budgets).toHaveLength(6);
    for (const { rows } of budgets) {
      const sums = rows
        .filter(({ cells }) => cells.length === 11)
        .map(({ cells }) => cells.map(({ text }) => text));
      expect(sums.length).toBeGreaterThan(30);
      for (const texts of sums) expectClosed(texts.slice(3, 9), texts[9] ?? '');
    }
  });

  test('the terms of every overall value', () => {
    const [terms] = titled(model, /^Terms of the overall value/);
    expect(terms?.rows).toHaveLength(40);
    for (const { cells } of terms?.rows ?? [])
      expectClosed(
        cells.slice(1, -1).map(({ text }) => text),
        cells.at(-1)?.text ?? '',
      );
  });

  test('the margin between the two values above it', () => {
    const margin = model.headline.find(({ label }) => label.startsWith('Margin'))?.figure ?? '';
    const [ranks] = titled(model, /^The candidates, ranked/);
    const values = ranks?.rows.slice(0, 2).map(({ cells }) => cells[2]?.text ?? '') ?? [];
    expectClosed([values[1] ?? '', margin], values[0] ?? '');
  });

  test('payload a year, from flights and the payloads beside it', () => {
    const [payload] = titled(model, /^Payload to each orbit/);
    const flights = payload?.columns.slice(1, -1).map(({ unit }) => Number(unit.replace(/\D/g, ''))) ?? [];
    for (const { cells } of payload?.rows ?? []) {
      const kg = cells
        .slice(1, -1)
        .map(({ text }) => (/^[\d,.]+$/.test(text) ? Number(text.replaceAll(',', '')) : 0));
      const tonnes = kg.reduce((sum, each, at) => sum + each * (flights[at] ?? 0), 0) / 1000;
      expect(tonnes.toFixed(1)).toBe(cells.at(-1)?.text.replaceAll(',', ''));
    }
  });
});

describe('the document', () => {
  test('numbers its tables and figures in the order they are read', () => {
    const { sections } = composeMemo(inventedFacts({ sites: 12, incomplete: 1, setAside: 2 }));
    const blocks = sections.flatMap((section) => section.blocks);
    const tableNumbers = blocks.flatMap((block) => (block.kind === 'table' ? [block.number] : []));
    const figureNumbers = blocks.flatMap((block) =>
      block.kind === 'map' || block.kind === 'contributions' ? [block.number] : [],
    );
    expect(tableNumbers).toEqual(tableNumbers.map((_, at) => at + 1));
    expect(figureNumbers).toEqual([1, 2]);
  });

  test('fills every column of every row', () => {
    for (const { columns, rows, caption } of tables(
      composeMemo(inventedFacts({ sites: 12, orbits: 4, criteria: 9, incomplete: 1, setAside: 2 })),
    ))
      for (const { cells } of rows)
        expect(
          cells.reduce((sum, { span }) => sum + (span ?? 1), 0),
          caption,
        ).toBe(columns.length);
  });

  test('lists 40 ranked sites and points to the CSV for the rest', () => {
    const model = composeMemo(inventedFacts({ sites: 57, orbits: 2, criteria: 3 }));
    const [ranks] = titled(model, /^The candidates, ranked/);
    expect(ranks?.rows).toHaveLength(40);
    expect(ranks?.notes.join(' ')).toMatch(/17 further sites of the study are not listed here.*CSV/);
  });

  test('names those without a rank with their reasons', () => {
    const model = composeMemo(inventedFacts({ sites: 12, incomplete: 1, setAside: 2 }));
    expect(titled(model, /^Incomplete candidates/)[0]?.rows[0]?.cells.at(-1)?.text).toBe(
      'no figure for Turn, worst orbit',
    );
    expect(titled(model, /^Set aside/)[0]?.rows).toHaveLength(2);
    expect(titled(model, /^Set aside/)[0]?.rows[0]?.cells[1]?.text).toMatch(
      /Payload a year −1\.0 t\/yr, limit ≥ 0/,
    );
  });

  test('prints every constant with its source, and every loss, reserve and setting', () => {
    const model = composeMemo(inventedFacts({ sites: 2 }));
    const constants =
      titled(model, /^Constants/)[0]?.rows.map(({ cells }) => cells.map(({ text }) => text)) ?? [];
    // WGS 84, NGA.STND.0036 [read in the method's table of constants].
    expect(constants).toContainEqual(expect.arrayContaining(['a', '6,378,137', 'm']));
    expect(constants).toContainEqual(expect.arrayContaining(['1/f', '298.257223563']));
    expect(constants).toContainEqual(expect.arrayContaining(['ω', '7.292115e−5', 'rad/s']));
    for (const row of constants) expect(row[4]?.length).toBeGreaterThan(10);
    const assumptions = titled(model, /^Losses, reserve and settings/)[0]?.rows.map(
      ({ cells }) => cells[1]?.text,
    );
    expect(assumptions).toEqual(['1,320 m/s', '185 m/s', '15 m/s', '40 m/s', '42 kg', '0.6']);
  });
});

describe('with flown losses', () => {
  const flown: FlownState = {
    kind: 'flown',
    figures: {
      converged: true,
      reason: null,
      payloadKg: 4_612.4,
      flownInclinationDeg: 28,
      burnOutS: 521.7,
      launchHeadingDeg: 91.2,
      maxDynamicPressurePa: 34_120,
      idealDeltaVMps: 8_925.4,
      relativeSpeedMps: 7_390.3,
      centrifugalMps: 14.8,
      lossesMps: { gravity: 1_250.2, drag: 59.9, steering: 150.4, backPressure: 89.4 },
      remainderMps: -13,
    },
  };
  const states: FlownState[] = [flown, { kind: 'none', reason: 'falls-short' }, { kind: 'pending' }];
  const model = composeMemo(
    inventedFacts({ sites: 3, orbits: 2, flown: (site) => states[site] ?? { kind: 'pending' } }),
  );

  test('every ascent’s parts add up to its ideal Δv, and the payload stands beside', () => {
    const [ascents] = titled(model, /^Flown ascents to /);
    const texts = ascents?.rows.map(({ cells }) => cells.map(({ text }) => text)) ?? [];
    const row = texts.find((cells) => cells.at(-1) === '4,612') ?? [];
    expectClosed(row.slice(2, 8), row[8] ?? '');
  });

  test('what fell short and what is not flown yet is said in place of figures, in every table', () => {
    // Sites stand in the order of their ranks, so the words are looked for anywhere in the second column.
    for (const { caption, rows } of titled(model, /^(Flown ascents to|Δv to|Payload to each orbit)/)) {
      const words = rows.map(({ cells }) => cells[1]?.text ?? '').filter((text) => /[a-z]{4}/.test(text));
      expect(
        words.filter((text) => text !== 'direct' && text !== 'dogleg' && text !== 'plane change').sort(),
        caption,
      ).toEqual(['falls short', 'not flown yet']);
    }
    expect(JSON.stringify(model)).toContain('2 ascents of the listed sites are not flown yet');
    expect(JSON.stringify(model)).not.toContain('no ascent is flown');
  });

  test('the sources of the flown method are printed, and only where it is used', () => {
    const atmosphere = 'U.S. Standard Atmosphere 1976 (NOAA-S/T 76-1562)';
    expect(JSON.stringify(titled(model, /^Sources of the method/))).toContain(atmosphere);
    const entered = composeMemo(inventedFacts({ sites: 2 }));
    expect(JSON.stringify(entered)).not.toContain(atmosphere);
  });
});

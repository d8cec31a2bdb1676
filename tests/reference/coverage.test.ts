import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { reference, referenceFiles, rowsOf, topics } from '#tests/support/reference.ts';

const TESTS = fileURLToPath(new URL('..', import.meta.url));
/** Files that are no tables of published rows: the list of all checks, and of those that nothing uses. */
const LISTS = ['checks.csv', 'unused.csv'];

function testFiles(folder: string): string[] {
  return fs.readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const name = path.join(folder, entry.name);
    if (entry.isDirectory()) return testFiles(name);
    return entry.name.endsWith('.test.ts') ? [name] : [];
  });
}

/** Half a unit of the last printed digit. */
function halfDigit(printed: string): number {
  const [, fraction = '', exponent = '0'] = /^-?\d*\.?(\d*)(?:e([+-]?\d+))?$/i.exec(printed) ?? [];
  return 0.5 * 10 ** (Number(exponent) - fraction.length);
}

describe('published rows', () => {
  const sources = testFiles(TESTS).map((name) => fs.readFileSync(name, 'utf8'));

  test('every file has a topic, and every topic a file', () => {
    expect(referenceFiles().sort()).toEqual([...topics.map((topic) => `${topic}.csv`), ...LISTS].sort());
  });

  test.each(topics)('%s is read by a test, and no row is skipped', (topic) => {
    expect(reference(topic)).toHaveLength(rowsOf(`${topic}.csv`).length);
    const readers = sources.filter((source) => source.includes(`reference('${topic}')`));
    expect(readers.length).toBeGreaterThan(0);
    for (const reader of readers) expect(reader).not.toMatch(/\.(skip|only|todo|skipIf|runIf)\b/);
  });

  test.each(topics)('%s says why where a tolerance is wider than half the last printed digit', (topic) => {
    const unexplained = reference(topic).filter(({ printed, expected, tolerance, reason }) => {
      const width = tolerance.kind === 'rel' ? tolerance.value * Math.abs(expected) : tolerance.value;
      return width > halfDigit(printed) * 1.001 && reason === '';
    });
    expect(unexplained.map(({ id }) => id)).toEqual([]);
  });

  test('every check of the published list is used or listed with why it is not, never both', () => {
    const used = topics.flatMap((topic) => rowsOf(`${topic}.csv`).map((row) => row['check'] || row['id']));
    const unused = rowsOf('unused.csv');
    expect(unused.filter(({ why }) => !why)).toEqual([]);
    const listed = unused.map(({ id }) => id);
    expect(listed.filter((id) => used.includes(id))).toEqual([]);
    const ids = rowsOf('checks.csv').map(({ id }) => id);
    expect(ids.filter((id) => !used.includes(id) && !listed.includes(id))).toEqual([]);
  });
});

import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { readPlaywright, readVitest, summarise } from '#scripts/test-summary.ts';
import { nodeIsFit } from '#scripts/bootstrap.mjs';

const folder = fs.mkdtempSync(path.join(os.tmpdir(), 'spinward-summary-'));
afterAll(() => fs.rmSync(folder, { recursive: true }));

function report(content: unknown): string {
  const file = path.join(folder, `${Math.random()}.json`);
  fs.writeFileSync(file, JSON.stringify(content));
  return file;
}

test('vitest: a file that fails before its first test counts as a failure', () => {
  const testResults = [
    { status: 'passed', assertionResults: [{}, {}] },
    { status: 'failed', assertionResults: [] },
  ];
  const file = report({ success: false, numPassedTests: 2, numFailedTests: 0, testResults });
  expect(readVitest(file)).toEqual({ passed: 2, failed: 1 });
});

test('vitest: an unhandled error outside every test counts as a failure', () => {
  const file = report({ success: false, numPassedTests: 2, numFailedTests: 0, testResults: [] });
  expect(readVitest(file)).toEqual({ passed: 2, failed: 1 });
});

test('Playwright: errors outside tests count as failures, a test that passed at its second try does not', () => {
  const file = report({ stats: { expected: 5, unexpected: 1, flaky: 1 }, errors: [{}] });
  expect(readPlaywright(file)).toEqual({ passed: 6, failed: 2 });
});

test('a run without a report has failed', () => {
  expect(readVitest(path.join(folder, 'none'))).toEqual({ passed: 0, failed: 1 });
  expect(readPlaywright(path.join(folder, 'none'))).toEqual({ passed: 0, failed: 1 });
});

test('the last line is the sum, alone', () => {
  const text = summarise([
    { name: 'lint', passed: false, seconds: 20 },
    { name: 'tests', passed: true, seconds: 61.4, counts: { passed: 40, failed: 0 } },
    { name: 'browser tests', passed: false, seconds: 5, counts: { passed: 2, failed: 1 } },
  ]);
  expect(text.split('\n').at(-1)).toBe('42 passed, 1 failed');
  expect(text).toMatch(/^FAILED {2}lint +20 s$/m);
  expect(text).toMatch(/^ok {6}tests +61 s {2}40 passed, 0 failed$/m);
});

// [read] the engines field of package.json, which is that of the pinned packages.
test.each([
  ['20.18.3', false],
  ['20.19.0', true],
  ['20.20.2', true],
  ['21.7.0', false],
  ['22.11.0', false],
  ['22.12.0', true],
  ['24.1.0', true],
])('Node %s fits: %s', (version, fits) => expect(nodeIsFit(version)).toBe(fits));

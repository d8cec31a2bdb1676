import fs from 'node:fs';

export interface Counts {
  passed: number;
  failed: number;
}

export interface Outcome {
  name: string;
  passed: boolean;
  seconds: number;
  counts?: Counts;
}

/** A run that wrote no report did not get to its tests: that is a failure, not nothing. */
const NO_REPORT: Counts = { passed: 0, failed: 1 };

const read = (file: string): unknown =>
  fs.existsSync(file) ? (JSON.parse(fs.readFileSync(file, 'utf8')) as unknown) : undefined;

interface VitestReport {
  success: boolean;
  numPassedTests: number;
  numFailedTests: number;
  testResults: { status: string; assertionResults: unknown[] }[];
}

/** Counts of vitest's JSON report; a file that fails before its first test counts as one. */
export function readVitest(file: string): Counts {
  const report = read(file) as VitestReport | undefined;
  if (!report) return NO_REPORT;
  const unread = report.testResults.filter(
    (result) => result.status === 'failed' && !result.assertionResults.length,
  );
  const failed = report.numFailedTests + unread.length;
  return { passed: report.numPassedTests, failed: failed || (report.success ? 0 : 1) };
}

interface PlaywrightReport {
  stats: { expected: number; unexpected: number; flaky: number };
  errors: unknown[];
}

/** Counts of Playwright's JSON report; an error outside any test counts as one. A test that passed at its second try passed. */
export function readPlaywright(file: string): Counts {
  const report = read(file) as PlaywrightReport | undefined;
  if (!report) return NO_REPORT;
  const { expected, unexpected, flaky } = report.stats;
  return { passed: expected + flaky, failed: unexpected + report.errors.length };
}

/** The closing table, and below it, alone on its line, the sum of all tests. */
export function summarise(outcomes: readonly Outcome[]): string {
  const width = Math.max(...outcomes.map((outcome) => outcome.name.length));
  const lines = outcomes.map(({ name, passed, seconds, counts }) => {
    const tests = counts ? `${counts.passed} passed, ${counts.failed} failed` : '';
    return `${passed ? 'ok    ' : 'FAILED'}  ${name.padEnd(width)}  ${seconds.toFixed(0).padStart(4)} s  ${tests}`.trimEnd();
  });
  const sum = (key: keyof Counts): number =>
    outcomes.reduce((total, { counts }) => total + (counts?.[key] ?? 0), 0);
  return ['', ...lines, '', `${sum('passed')} passed, ${sum('failed')} failed`].join('\n');
}

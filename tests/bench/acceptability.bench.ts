import { acceptability } from '#core/decision/acceptability.ts';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { uniforms } from './invented-study.ts';
import { plainAcceptability, type PlainSite } from './plain-acceptability.ts';

const SITES = 40;
const CRITERIA = 12;
const SAMPLES = 10_000;
const ROUNDS = 5;

function invented(spread: number): PlainSite[] {
  const next = uniforms(42);
  const figure = () => {
    const likely = 20 + 60 * next();
    return { low: likely - spread * next(), likely, high: likely + spread * next() };
  };
  return Array.from({ length: SITES }, (_, site) => ({
    code: `S${site}`,
    figures: Array.from({ length: CRITERIA }, figure),
  }));
}

function fromCore(sites: readonly PlainSite[]) {
  const criterion: Criterion = {
    direction: 'more',
    levels: { kind: 'fixed', worst: 0, best: 100 },
    limit: null,
  };
  const uncertain = sites.flatMap(({ figures }, site) =>
    figures.map((figure, j) => ({ site, criterion: j, ...figure })),
  );
  return () =>
    acceptability({
      prepared: prepare(
        Array.from({ length: CRITERIA }, () => criterion),
        figureTable(sites.map(({ figures }) => figures.map(({ likely }) => likely))),
      ),
      uncertain: uncertain.filter(({ low, high }) => low !== high),
      weights: { kind: 'simplex', criterionCount: CRITERIA },
      samples: SAMPLES,
      seed: 1,
    });
}

/** Milliseconds of processor time in the best of some rounds, so that what else the machine does hardly counts. */
function best(run: () => unknown): number {
  const times = Array.from({ length: ROUNDS }, () => {
    const from = process.cpuUsage();
    run();
    const { user, system } = process.cpuUsage(from);
    return (user + system) / 1_000;
  });
  return Math.min(...times);
}

/** SMAA-2 beside the same analysis over objects, on one core. */
export async function benchAcceptability(): Promise<string[]> {
  const lines = [
    { name: 'fixed figures', sites: invented(0), goal: 100 },
    { name: 'every figure uncertain', sites: invented(10), goal: 300 },
  ].map(({ name, sites, goal }) => {
    const core = best(fromCore(sites));
    const plain = best(() => plainAcceptability(sites, SAMPLES, uniforms(1)));
    return `acceptability: ${SAMPLES} samples, ${SITES} sites × ${CRITERIA} criteria, ${name}: ${core.toFixed(0)} ms (goal under ${goal}), plain objects ${plain.toFixed(0)} ms, ratio ${(plain / core).toFixed(1)}`;
  });
  return Promise.resolve(lines);
}

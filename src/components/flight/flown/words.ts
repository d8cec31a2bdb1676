import type { AscentStateName, StudyAscent, StudyAscents } from '#contract/study-ascents.ts';
import { formatNumber } from '#contract/format.ts';

const REASONS: Readonly<Record<string, string>> = {
  'out-of-reach': 'Out of reach: the turn would be over 60°.',
  'does-not-lift-off': 'Does not lift off: on the pad the thrust is no more than the weight.',
  'too-much-after-injection':
    'The upper stages hold less than the transfer, the plane change and the reserve take after injection.',
  'falls-short': 'Falls short of the orbit even without payload.',
  'no-permitted-heading': 'No heading within the permitted azimuths leads to the orbit.',
  'did-not-converge': 'The search ended without meeting the end conditions, so there is no figure.',
};

/** Why a flight gave no payload, in plain words. */
export const reasonInWords = (reason: string | null): string =>
  REASONS[reason ?? ''] ?? 'The flight gave no payload.';

const STATES: Readonly<Record<Exclude<AscentStateName, 'current' | 'failed'>, string>> = {
  stale: 'Inputs changed since; figures of the inputs before.',
  waiting: 'Waiting to be flown.',
  flying: 'Being flown.',
  cancelled: 'Cancelled before it was flown.',
  missing: 'Not flown yet.',
};

/** What there is to say of a flight beside its figures; empty where it is current and reached its orbit. */
export function stateInWords({ state, reason, figures, figuresAreStale }: StudyAscent): string {
  if (state === 'failed') return `Stopped by a fault: ${reason ?? 'nothing is known of it'}`;
  const noPayload = figures && !figures.converged ? reasonInWords(figures.reason) : '';
  if (state === 'current') return noPayload;
  const kept = figuresAreStale && state !== 'stale' ? ` ${STATES.stale}` : '';
  return `${noPayload} ${STATES[state]}${kept}`.trim();
}

type Counts = StudyAscents['counts'];

/** What of all flights is asked for, done, and left to ask for. */
export interface Progress {
  underWay: number;
  done: number;
  /** Of those that were asked for and not cancelled. */
  asked: number;
  /** That have no current result and are not under way. */
  open: number;
  all: number;
}

export function progressOf(counts: Counts): Progress {
  const underWay = counts.waiting + counts.flying;
  const done = counts.current + counts.failed;
  const open = counts.missing + counts.stale + counts.failed + counts.cancelled;
  return { underWay, done, asked: done + underWay, open, all: counts.current + open + underWay };
}

/** "about 40 s left", "about 3 min left"; of flights that wait, no time at all is none that anybody knows. */
export function timeLeft(seconds: number | null): string {
  if (seconds === null || seconds <= 0) return 'the time left is not known yet';
  if (seconds < 10) return `about ${formatNumber(Math.ceil(seconds))} s left`;
  if (seconds < 90) return `about ${formatNumber(Math.ceil(seconds / 5) * 5)} s left`;
  return `about ${formatNumber(Math.ceil(seconds / 60))} min left`;
}

import { AscentFigures } from '#contract/ascent-job.ts';
import type { FlownState } from '#contract/flown-results.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { Db } from '#db/client.ts';
import { findOutcomes } from '#db/queries/ascent.ts';
import { pairTasks } from './input-hash.ts';
import { obstacleOf } from './study-tasks.ts';

/** Hashes asked for in one statement. */
const AT_ONCE = 5_000;

function stateOf(outcome: unknown): FlownState {
  const figures = AscentFigures.parse(outcome);
  return figures.converged ? { kind: 'flown', figures } : { kind: 'none', reason: figures.reason };
}

/** What is flown of a study as it stands: a row a site, a state an orbit, in the order of the inputs. */
export async function readFlownStates(db: Db, inputs: StudyInputs): Promise<FlownState[][]> {
  const { vehicle, sites, orbits } = inputs;
  const tasks = vehicle && obstacleOf(inputs) === null ? pairTasks(inputs, vehicle) : [];
  const states = new Map<string, FlownState>();
  for (let from = 0; from < tasks.length; from += AT_ONCE) {
    const hashes = tasks.slice(from, from + AT_ONCE).map(({ hash }) => hash);
    for (const { hash, outcome } of await findOutcomes(db, { hashes })) states.set(hash, stateOf(outcome));
  }
  return sites.map((_, site) =>
    orbits.map((_orbit, orbit) => {
      const hash = tasks[site * orbits.length + orbit]?.hash;
      return (hash === undefined ? undefined : states.get(hash)) ?? { kind: 'pending' };
    }),
  );
}

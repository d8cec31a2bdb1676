import { formatNumber, listInWords } from '#contract/format.ts';
import { Button } from '#components/ui/Button.tsx';
import { Conflict } from '#components/ui/Conflict.tsx';
import { Notice } from '#components/ui/States.tsx';
import { ratioInFigures, ratioOf } from '#components/weights/judgement.ts';
import { METHOD_WAYS, nameIn, type Names } from '#components/weights/words.ts';
import type { WeightStatement } from '#contract/weights.ts';
import type { Points, WeightSet } from './use-weight-set.ts';

const WORDS = { saved: 'Saved.', waiting: 'Not saved yet.', saving: 'Saving…' } as const;

interface SaveNoteProps {
  set: WeightSet;
  /** "the study’s weights", "your weights" */
  what: string;
  /** Of criteria and groups, by id. */
  names: Names;
}

/** Where the saving of a set of weights stands; a conflict shows both sets where they differ, and the person chooses. */
export function SaveNote({ set, what, names }: SaveNoteProps) {
  const { saving } = set;
  if (saving.kind === 'conflict') {
    return (
      <Conflict
        what={what}
        yours={inWords(set.statement, saving.theirs, names)}
        theirs={inWords(saving.theirs, set.statement, names)}
        keepTheirs="Keep theirs"
        putYours="Put mine"
        onKeepTheirs={set.keepTheirs}
        onPutYours={set.putMine}
      />
    );
  }
  if (saving.kind === 'failed') {
    return (
      <Notice
        fact={`Not saved: ${what}`}
        requestId={saving.error.requestId}
        actions={
          <>
            <Button size="small" icon="again" onClick={set.retry}>
              Save again
            </Button>
            <Button size="small" kind="text" onClick={set.keepTheirs}>
              Drop my changes
            </Button>
          </>
        }
      >
        {saving.error.message}
      </Notice>
    );
  }
  return (
    <p className="caption" role="status">
      {WORDS[saving.kind]}
    </p>
  );
}

/** What a statement says that the other does not: its points where both are points, else the way it was set. */
function inWords(one: WeightStatement, other: WeightStatement, names: Names): string {
  if (one.method !== other.method) return `set by ${METHOD_WAYS[one.method]}`;
  if (one.method === 'centroid')
    return listInWords(
      one.order.map((id) => nameIn(names, id)),
      'then',
    );
  if (one.method === 'pairwise')
    return (
      listInWords(
        one.judgements
          .filter(([a, b, ratio]) => ratioOf(other.judgements, a, b) !== ratio)
          .map(([a, b, ratio]) => `${nameIn(names, a)} to ${nameIn(names, b)} ${ratioInFigures(ratio)}`),
      ) || 'the same'
    );
  const differing = [...names].filter(([id]) => pointsOf(one.points, id) !== pointsOf(other.points, id));
  return (
    listInWords(differing.map(([id, name]) => `${name} ${formatNumber(pointsOf(one.points, id), 1)}`)) ||
    'the same'
  );
}

const pointsOf = (points: Points, id: string): number => points[id] ?? 0;

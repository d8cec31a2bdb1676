import { formatNumber, listInWords } from '#contract/format.ts';
import { Button } from '#components/ui/Button.tsx';
import { Conflict } from '#components/ui/Conflict.tsx';
import { Notice } from '#components/ui/States.tsx';
import type { Points, WeightSet } from './use-weight-set.ts';

const WORDS = { saved: 'Saved.', waiting: 'Not saved yet.', saving: 'Saving…' } as const;

interface SaveNoteProps {
  set: WeightSet;
  /** "the study’s weights", "your weights" */
  what: string;
  criteria: readonly { id: string; name: string }[];
}

/** Where the saving of a set of weights stands; a conflict shows both sets where they differ, and the person chooses. */
export function SaveNote({ set, what, criteria }: SaveNoteProps) {
  const { saving } = set;
  if (saving.kind === 'conflict') {
    const differing = criteria.filter(
      ({ id }) => pointsOf(set.points, id) !== pointsOf(saving.theirs.points, id),
    );
    const inWords = (points: Points): string =>
      listInWords(differing.map(({ id, name }) => `${name} ${formatNumber(pointsOf(points, id), 1)}`)) ||
      'the same';
    return (
      <Conflict
        what={what}
        yours={inWords(set.points)}
        theirs={inWords(saving.theirs.points)}
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

const pointsOf = (points: Points, id: string): number => points[id] ?? 0;

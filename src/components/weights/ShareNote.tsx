import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import { Button } from '#components/ui/Button.tsx';

interface ShareNoteProps {
  set: WeightSet;
  /** Why one's own set cannot be changed; undefined where it can. */
  locked: string | undefined;
}

/** Whether the study sees one's own set. Sharing gives it to the lead to choose from and to the agreement view. */
export function ShareNote({ set, locked }: ShareNoteProps) {
  const { shared, shares } = set.kept;
  // What waits to be saved may be the first weights; sharing goes with it.
  const nothing = shares === null && set.saving.kind === 'saved';
  return (
    <div className="wt-share">
      <p>
        <b>{shared ? 'Shared with the study.' : 'Seen by you alone.'}</b>{' '}
        {shared
          ? 'Every member sees these weights and the ranking they give; the lead may choose them.'
          : 'They move this screen alone; nobody else’s ranking changes.'}
      </p>
      {shared ? (
        <Button size="small" notYet={locked} onClick={() => set.share(false)}>
          Stop sharing my weights
        </Button>
      ) : (
        <Button
          size="small"
          notYet={locked ?? (nothing ? 'There are no weights to share yet.' : undefined)}
          onClick={() => set.share(true)}
        >
          Share my weights with the study
        </Button>
      )}
    </div>
  );
}

import type { CriterionColumn } from './columns.ts';
import { Panel } from '#components/ui/Finding.tsx';
import { useNames } from '#components/weights/use-names.ts';
import { changedSince, METHOD_WAYS, originInWords } from '#components/weights/words.ts';
import { useMembersSets } from '#components/weights/use-members.ts';
import { isChosen } from '#components/weights/origin.ts';
import { SaveNote } from './SaveNote.tsx';
import type { WeightSet } from './use-weight-set.ts';
import { WeightSliders } from './WeightSliders.tsx';

interface WeightPanelProps {
  studyId: string;
  columns: readonly CriterionColumn[];
  set: WeightSet;
  /** Why these weights cannot be changed by this person now; undefined where they can. */
  locked: string | undefined;
}

/** The weights under a ranking: whose they are, where they come from, and their points. */
export function WeightPanel({ studyId, columns, set, locked }: WeightPanelProps) {
  const names = useNames(
    studyId,
    columns.map(({ criterion }) => criterion),
  );
  const mine = set.kept.weights === 'mine';
  return (
    <Panel
      title={mine ? 'Your weights' : 'The study’s weights'}
      caption={
        mine ? (
          set.kept.shared ? (
            'They move this screen alone; you share them with the study.'
          ) : (
            'They move this screen alone; nobody else’s ranking changes.'
          )
        ) : (
          <StudyCaption studyId={studyId} columns={columns} set={set} />
        )
      }
    >
      <WeightSliders
        studyId={studyId}
        columns={columns}
        set={set}
        locked={
          locked ??
          (isChosen(set.kept)
            ? 'Chosen with a reason; set them apart in Criteria to change them.'
            : undefined)
        }
      />
      {locked === undefined && (
        <div className="mt-3">
          <SaveNote set={set} what={mine ? 'your weights' : 'the study’s weights'} names={names} />
        </div>
      )}
    </Panel>
  );
}

function StudyCaption({ studyId, columns, set }: Omit<WeightPanelProps, 'locked'>) {
  const { items } = useMembersSets(studyId);
  const { origin, reason, method } = set.kept;
  const criteria = columns.map(({ criterion }) => criterion);
  const since = items ? changedSince(set.kept, criteria, items) : '';
  if (!origin) return <>They move everyone’s ranking at once.</>;
  return (
    <>
      {originInWords(origin)}
      {origin.kind !== 'mean' && `, by ${METHOD_WAYS[method]}`}
      {reason ? `: ${reason}` : '.'} {since}
    </>
  );
}

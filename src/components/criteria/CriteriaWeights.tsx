import { useMemo, useState } from 'react';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { SaveNote } from '#components/ranking/SaveNote.tsx';
import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import { Button } from '#components/ui/Button.tsx';
import { MethodBar } from '#components/weights/MethodBar.tsx';
import { MethodEditor } from '#components/weights/MethodEditor.tsx';
import { ShareNote } from '#components/weights/ShareNote.tsx';
import { StudyOrigin } from '#components/weights/StudyOrigin.tsx';
import { useMethodDesk } from '#components/weights/use-method-desk.ts';
import { useNames } from '#components/weights/use-names.ts';
import { isChosen } from '#components/weights/origin.ts';
import { originInWords, unjudgedInWords } from '#components/weights/words.ts';
import type { Criterion } from '#contract/criterion.ts';
import { weighing } from '#contract/weighing.ts';
import type { WeightsOf } from '#contract/weights.ts';
import { CriteriaTable, LOCK_NOTE } from './CriteriaTable.tsx';

interface CriteriaWeightsProps {
  studyId: string;
  whose: WeightsOf;
  /** Text criteria too, in their order. */
  items: readonly Criterion[];
  columns: readonly CriterionColumn[];
  weights: WeightSet;
  weightsLocked: string | undefined;
  inputsLocked: string | undefined;
  chosen: string | null;
  onChoose: (criterionId: string) => void;
  onMove: (criterion: Criterion, position: number) => void;
}

/** The criteria with one set of weights, by any of the four ways; whose it is says what stands under it. */
export function CriteriaWeights({ studyId, whose, weights, weightsLocked, ...table }: CriteriaWeightsProps) {
  const { columns } = table;
  const weighed = useMemo(() => columns.map(({ criterion }) => criterion), [columns]);
  const names = useNames(studyId, table.items);
  const desk = useMethodDesk(weights, weighed);
  const [apart, setApart] = useState(false);
  const { levels } = useMemo(() => weighing(weighed, weights.statement), [weighed, weights.statement]);
  const { origin } = weights.kept;
  // A choice has a written reason: it is let go of knowingly, not by brushing a slider.
  const kept = weightsLocked === undefined && isChosen(weights.kept);
  const locked =
    kept && !apart ? `${originInWords(origin)}. Set them apart to change them by hand.` : weightsLocked;
  const unjudged = unjudgedInWords(levels, names);
  return (
    <>
      {weighed.length > 0 && <MethodBar desk={desk} />}
      {kept && !apart && (
        <div className="wt-share">
          <p id={LOCK_NOTE}>{locked} The reason for the choice falls away with the first change.</p>
          <Button size="small" onClick={() => setApart(true)}>
            Set the study’s weights apart
          </Button>
        </div>
      )}
      {weightsLocked && (
        <p className="caption pb-2" id={LOCK_NOTE}>
          {weightsLocked}
        </p>
      )}
      <CriteriaTable
        {...table}
        weights={weights}
        levels={levels}
        names={names}
        pointsShown={desk.method === 'points' && desk.draft !== null}
        weightsLocked={locked}
      />
      {unjudged && <p className="caption">{unjudged}</p>}
      {weighed.length > 0 && (
        <div className="mt-4">
          <MethodEditor desk={desk} columns={columns} names={names} locked={locked !== undefined} />
        </div>
      )}
      {weightsLocked === undefined && (
        <div className="mt-3">
          <SaveNote
            set={weights}
            what={whose === 'mine' ? 'your weights' : 'the study’s weights'}
            names={names}
          />
        </div>
      )}
      {whose === 'mine' ? (
        <ShareNote set={weights} locked={weightsLocked} />
      ) : (
        <div className="mt-6">
          <StudyOrigin
            studyId={studyId}
            set={weights}
            items={weighed}
            locked={weightsLocked}
            onChosen={() => setApart(false)}
          />
        </div>
      )}
    </>
  );
}

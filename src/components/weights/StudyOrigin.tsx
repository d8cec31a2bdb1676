import { useState } from 'react';
import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import { Button } from '#components/ui/Button.tsx';
import { TextArea } from '#components/ui/Field.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import type { WeighItem } from '#core/decision/statement.ts';
import { ChooseWeights } from './ChooseWeights.tsx';
import { useMembersSets } from './use-members.ts';
import { changedSince, METHOD_WAYS, originInWords } from './words.ts';

interface StudyOriginProps {
  studyId: string;
  /** The study's. */
  set: WeightSet;
  items: readonly WeighItem[];
  /** Why the study's weights cannot be changed by this person now; undefined where they can. */
  locked: string | undefined;
  onChosen: () => void;
}

/** Where the study's weights come from and why, for all to see; a lead chooses here. */
export function StudyOrigin({ studyId, set, items, locked, onChosen }: StudyOriginProps) {
  const [choosing, setChoosing] = useState(false);
  const members = useMembersSets(studyId);
  const { origin, reason, version, method } = set.kept;
  const since = members.items ? changedSince(set.kept, items, members.items) : '';
  const apart = origin === null || origin.kind === 'apart';
  const shown = locked === undefined || origin !== null;
  if (!shown) return null;
  return (
    <Panel title="Where the study’s weights come from">
      <p>
        {originInWords(origin)}
        {origin && origin.kind !== 'mean' && `, by ${METHOD_WAYS[method]}`}
        {apart || reason === '' ? '.' : `: ${reason}`}
      </p>
      {apart && locked !== undefined && reason !== '' && <p>{reason}</p>}
      {since && <p className="caption">{since}</p>}
      {apart && locked === undefined && origin !== null && !choosing && (
        <Reason key={reason} reason={reason} onReason={set.explain} />
      )}
      {locked === undefined && (
        <div className="mt-3">
          {choosing ? (
            <ChooseWeights
              studyId={studyId}
              version={version}
              members={members}
              onClose={() => setChoosing(false)}
              onStale={set.refresh}
              onChosen={() => {
                setChoosing(false);
                set.refresh();
                onChosen();
              }}
            />
          ) : (
            <Button size="small" onClick={() => setChoosing(true)}>
              Choose from members’ sets
            </Button>
          )}
        </div>
      )}
    </Panel>
  );
}

/** Why weights set apart are as they are; saved on leaving the field. */
function Reason({ reason, onReason }: { reason: string; onReason: (reason: string) => void }) {
  const [typed, setTyped] = useState(reason);
  return (
    <div className="mt-3">
      <TextArea
        label="Reason"
        optional
        hint="Shown to every member and printed in the memo."
        rows={2}
        maxLength={2_000}
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={() => {
          if (typed.trim() !== reason) onReason(typed.trim());
        }}
      />
    </div>
  );
}

import { useState } from 'react';
import { useGridFits } from '#components/ranking/use-wide.ts';
import { inputLockOf, type Viewer } from '#components/ranking/viewer.ts';
import type { RankingViewProps } from '#components/ranking/views.ts';
import { Panel } from '#components/ui/Finding.tsx';
import { toast } from '#components/ui/Toast.tsx';
import { useNames } from '#components/weights/use-names.ts';
import { countIgnored, withoutIgnored } from '#contract/what-if-model.ts';
import { changeLines } from '#contract/what-if-words.ts';
import type { WeightStatement } from '#contract/weights.ts';
import { AdoptDialog } from './AdoptDialog.tsx';
import { ChangeList } from './ChangeList.tsx';
import { takenBack } from './draft.ts';
import { RankMoves } from './RankMoves.tsx';
import { Tries } from './Tries.tsx';
import type { WhatIfActs } from './use-acts.ts';
import { useTrial } from './use-trial.ts';
import type { LiveWhatIf } from './use-what-if.ts';
import { WhatIfBar } from './WhatIfBar.tsx';
import { WhatIfFinding } from './WhatIfFinding.tsx';
import { WhatIfNotices } from './WhatIfNotices.tsx';
import { WhatIfWeights } from './WhatIfWeights.tsx';

interface WhatIfDeskProps extends RankingViewProps {
  /** The study's. */
  statement: WeightStatement;
  whatIf: LiveWhatIf;
  acts: WhatIfActs;
  onStartAnew: () => void;
}

/** One what-if: what is tried at the left, what comes of it at the right. */
export function WhatIfDesk({
  studyId,
  model,
  live,
  viewer,
  statement,
  whatIf,
  acts,
  ...rest
}: WhatIfDeskProps) {
  const { kept, draft, step } = whatIf;
  const { changes } = draft;
  const { figures } = model;
  const trial = useTrial(model, statement, changes);
  const names = useNames(studyId, figures.criteria);
  const narrow = !useGridFits();
  const [adopting, setAdopting] = useState(false);
  const locked = whatIfLockOf(viewer);
  const lines = changeLines(changes, { figures, statement });
  const ignored = countIgnored(trial.ignored);
  const adopt = async (reason: string): Promise<void> => {
    const adopted = await acts.adopt(reason, draft.revision);
    if (!adopted) return;
    setAdopting(false);
    whatIf.open(kept?.id ?? null, adopted.revision);
    live.again();
    live.weights.refresh();
    toast(`“${draft.name}” adopted as revision ${adopted.revision}.`);
  };
  return (
    <>
      <WhatIfBar
        live={whatIf}
        acts={acts}
        locked={locked}
        onAdopt={viewer.role === 'lead' ? () => setAdopting(true) : undefined}
        notAdopted={notAdopted({ viewer, whatIf, lines: lines.length })}
        onSave={() => void acts.save(kept?.mine ? changes : withoutIgnored(changes, trial.ignored))}
        onStartAnew={rest.onStartAnew}
      />
      <WhatIfNotices
        live={whatIf}
        acts={acts}
        ignored={ignored}
        unweighed={trial.unweighed.map((id) => names.get(id) ?? 'a group')}
        onDropIgnored={
          locked === undefined
            ? () =>
                step(
                  { key: 'gone', label: 'taking out what has gone' },
                  withoutIgnored(changes, trial.ignored),
                )
            : undefined
        }
        revision={figures.revision}
      />
      <WhatIfFinding study={trial.study.ranking} here={trial.here.ranking} />
      <div className="rk-panels wi-panels">
        <div className="wi-column">
          <Panel title="Weights tried" caption={locked ?? 'Points for this what-if alone.'}>
            <WhatIfWeights
              statement={changes.weights ?? statement}
              study={trial.study.columns}
              here={trial.here.columns}
              groupNames={names}
              locked={locked}
              onChange={({ id, name }, weights) =>
                step({ key: `points ${id}`, label: `points for ${name}` }, { ...changes, weights })
              }
            />
          </Panel>
          {locked === undefined && <Tries figures={figures} changes={changes} step={step} />}
        </div>
        <div className="wi-column">
          <Panel
            title="Rank moves"
            caption="From the study’s ranking at the left to this what-if’s at the right."
          >
            {trial.moves.length > 0 ? (
              <RankMoves moves={trial.moves} narrow={narrow} />
            ) : (
              <p className="caption">The study has no ranks to move from yet.</p>
            )}
          </Panel>
          <Panel title="Changes tried">
            <ChangeList
              lines={lines}
              onTakeBack={
                locked === undefined
                  ? (line) =>
                      step({ key: 'back', label: `taking back ${line.what}` }, takenBack(changes, line.at))
                  : undefined
              }
            />
          </Panel>
        </div>
      </div>
      {adopting && (
        <AdoptDialog
          name={draft.name}
          revision={draft.revision}
          lines={lines}
          ignored={ignored}
          busy={acts.busy}
          error={acts.error}
          onClose={() => setAdopting(false)}
          onAdopt={(reason) => void adopt(reason)}
        />
      )}
    </>
  );
}

/** Why this person cannot keep a what-if here; undefined where they can. */
export function whatIfLockOf({ role, archived }: Viewer): string | undefined {
  if (archived) return 'The study is archived. Restore it to try changes.';
  return role === 'reader' ? 'A reader looks on; engineers, reviewers and leads keep what-ifs.' : undefined;
}

interface Adoptable {
  viewer: Viewer;
  whatIf: LiveWhatIf;
  /** How many changes count. */
  lines: number;
}

/** Why a what-if cannot be adopted now; undefined where it can. */
export function notAdopted({ viewer, whatIf, lines }: Adoptable): string | undefined {
  if (viewer.state === 'in-review')
    return 'In review: inputs and weights are locked until the study returns to draft.';
  const locked = inputLockOf(viewer);
  if (locked) return locked;
  if (!whatIf.kept || whatIf.unsaved) return 'Save the what-if first.';
  if (whatIf.movedOn) return 'The study has moved on. Look at the what-if against it first.';
  return lines === 0 ? 'It changes nothing of the study.' : undefined;
}

import { useMemo, useState } from 'react';
import { useApi } from '#components/live/hooks.ts';
import type { RankingViewProps } from '#components/ranking/views.ts';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { Notice } from '#components/ui/States.tsx';
import { Button } from '#components/ui/Button.tsx';
import type { Weights, WeightStatement } from '#contract/weights.ts';
import { useActs } from './use-acts.ts';
import { useWhatIf } from './use-what-if.ts';
import { WhatIfDesk } from './WhatIfDesk.tsx';
import { WhatIfList } from './WhatIfList.tsx';

/** What-ifs: changes tried beside the study's ranking, which touch the study only when a lead adopts one. */
export default function WhatIfView(props: RankingViewProps) {
  const { studyId, model } = props;
  const { data: weights } = useApi<Weights>(`/api/v1/studies/${studyId}/weights?weights=study`);
  const statement = useMemo(() => (weights ? statementOf(weights) : null), [weights]);
  const live = useWhatIf(studyId, model.figures.revision);
  const acts = useActs(live);
  // What is asked for while changes are not saved: another one's id, or null for a new one.
  const [asked, setAsked] = useState<{ id: string | null } | null>(null);
  const goTo = (id: string | null): void => {
    if (live.unsaved) setAsked({ id });
    else live.open(id);
  };
  const name = live.draft.name.trim();
  return (
    <>
      <p className="wi-promise">Nothing here changes the study until the lead adopts it.</p>
      {live.gone ? (
        <Notice
          fact="This what-if is not to be seen"
          actions={
            <Button size="small" onClick={() => live.open(null)}>
              Start a new one
            </Button>
          }
        >
          It was let go, or is shared no longer. The study and your own what-ifs are as they were.
        </Notice>
      ) : statement === null || live.waiting ? (
        <p className="caption">Reading what-ifs.</p>
      ) : (
        <WhatIfDesk {...props} {...{ statement, whatIf: live, acts, onStartAnew: () => goTo(null) }} />
      )}
      <div className="mt-9">
        <Panel title="What-ifs kept" caption="Your own, and those other members share.">
          <WhatIfList live={live} onOpen={({ id }) => goTo(id)} />
        </Panel>
      </div>
      <ConfirmDialog
        open={asked !== null}
        onClose={() => setAsked(null)}
        onConfirm={() => {
          live.open(asked?.id ?? null);
          setAsked(null);
        }}
        title="Leave without saving?"
        confirm="Lose the changes"
        destructive
      >
        <p>
          {name === '' ? 'The what-if on this screen' : `“${name}”`} holds changes that are not saved. They
          are lost when you leave it; the study is not touched.
        </p>
      </ConfirmDialog>
    </>
  );
}

const statementOf = ({ method, points, order, judgements }: Weights): WeightStatement => ({
  method,
  points,
  order,
  judgements,
});

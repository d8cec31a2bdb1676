import { useMemo, useState } from 'react';
import type { RankingViewProps } from '#components/ranking/views.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { Switch } from '#components/ui/Check.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { EmptyState, Notice } from '#components/ui/States.tsx';
import { useMembersSets } from '#components/weights/use-members.ts';
import { agreementOf, type MembersAgreement } from '#contract/agreement-model.ts';
import { listInWords } from '#contract/format.ts';
import type { MemberWeights } from '#contract/weights.ts';
import { RankLines } from './RankLines.tsx';
import { RanksSideBySide } from './RanksSideBySide.tsx';
import { WeightsSideBySide } from './WeightsSideBySide.tsx';
import { agreementInWords, disputesInWords, hasTies } from './words.ts';

/** Members' shared sets and the rankings they give, side by side: how far they agree, and where least. */
export default function AgreementView({ studyId, model, sheet, viewer }: RankingViewProps) {
  const { items, error, again } = useMembersSets(studyId);
  const [withMine, setWithMine] = useState(false);
  const members = useMemo(
    () => (items ? agreementOf(model, items, { own: withMine }) : null),
    [model, items, withMine],
  );
  const { figures } = model;
  if (!items || !members)
    return error ? (
      <Notice
        fact="Members’ sets were not read"
        requestId={error.requestId}
        actions={
          <Button size="small" icon="again" onClick={again}>
            Read again
          </Button>
        }
      >
        {error.message}
      </Notice>
    ) : (
      <p className="caption">Reading members’ sets.</p>
    );
  const { judges, agreement } = members;
  const mine = items.find((one) => one.mine);
  const kept = mine?.state === 'kept' && mine.set?.shares;
  const own = kept ? (
    <Switch
      label="With my own set, which you alone see"
      checked={withMine}
      onChange={(event) => setWithMine(event.target.checked)}
    />
  ) : null;
  const share =
    viewer.role !== 'reader' && mine?.state !== 'shared' ? (
      <ButtonLink size="small" href={`/studies/${studyId}/criteria?weights=mine`}>
        Set and share your own
      </ButtonLink>
    ) : null;
  if (judges.length === 0)
    return (
      <EmptyState
        fact="No member shares weights yet."
        actions={
          <>
            {share}
            {own}
          </>
        }
      >
        Leads, engineers and reviewers keep a set of their own under “Mine” in Criteria and share it with the
        study there. Two shared sets are compared here. {absentInWords(items, members)}
      </EmptyState>
    );
  return (
    <>
      <Panel title={<span role="status">{agreementInWords(members)}</span>}>
        {disputesInWords(members, figures).map((line) => (
          <p key={line}>{line}</p>
        ))}
        {!agreement && <p>Agreement needs two. Its weights and ranks stand below.</p>}
        <p className="caption">
          {agreement &&
            `Over the sites that every member ranks; 0 is no agreement, 1 is the same order${hasTies(members) ? '; tied sites share the mean of their ranks, and W is corrected for ties' : ''}. `}
          {absentInWords(items, members)}
        </p>
        {(own ?? share) && (
          <div className="wt-acts">
            {own}
            {share}
          </div>
        )}
      </Panel>
      <div className="rk-panels">
        <WeightsSideBySide members={members} sheet={sheet} model={model} />
        <RanksSideBySide members={members} model={model} />
      </div>
      {agreement && agreement.sites.length > 1 && (
        <div className="mt-9">
          <RankLines members={members} agreement={agreement} model={model} />
        </div>
      )}
    </>
  );
}

/** Who might weigh and is not among those compared. */
function absentInWords(items: readonly MemberWeights[], { judges }: MembersAgreement): string {
  const compared = new Set(judges.map(({ userId }) => userId));
  const absent = items.filter(({ userId }) => !compared.has(userId));
  if (absent.length === 0) return '';
  const words = absent.map(({ name, state, set }) => {
    if (state === 'none') return `${name} (no set yet)`;
    return state === 'shared' && set?.shares === null ? `${name} (no weights in it)` : `${name} (not shared)`;
  });
  return `Not compared: ${listInWords(words)}.`;
}

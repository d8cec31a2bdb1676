import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import { Button } from '#components/ui/Button.tsx';
import { Radio } from '#components/ui/Check.tsx';
import { TextArea } from '#components/ui/Field.tsx';
import { Notice } from '#components/ui/States.tsx';
import { formatCount, formatDateTimeUtc, formatNumber, listInWords } from '#contract/format.ts';
import type { MemberWeights, Weights, WeightsChoice } from '#contract/weights.ts';
import type { MembersSets } from './use-members.ts';
import { METHOD_WAYS } from './words.ts';

interface ChooseProps {
  studyId: string;
  /** The version of the study's set that a choice replaces. */
  version: number;
  members: MembersSets;
  onChosen: () => void;
  /** Someone wrote the study's weights meanwhile: read them again. */
  onStale: () => void;
  onClose: () => void;
}

const MEAN = 'mean';

/** The lead takes the study's weights from one member, or from all who share theirs, and writes why. */
export function ChooseWeights({ studyId, version, members, onChosen, onStale, onClose }: ChooseProps) {
  const [from, setFrom] = useState<string | null>(null);
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const { busy, failure, choose } = useChoice({ studyId, version, onChosen, onStale });
  const usable = (members.items ?? []).filter(({ state, set }) => state === 'shared' && set?.shares);
  const rest = (members.items ?? []).filter((one) => !usable.includes(one));
  const submit = (): void => {
    setTried(true);
    if (from === null || reason.trim() === '') return;
    void choose(from === MEAN ? { kind: 'mean' } : { kind: 'member', userId: from }, reason);
  };
  if (members.items !== null && usable.length === 0)
    return (
      <div className="box">
        <p className="box-fact">No member shares weights yet.</p>
        <p className="box-text">
          Leads, engineers and reviewers keep a set of their own under “Mine” and share it there. Until then
          the study’s weights are set apart, above.
        </p>
        <div className="box-acts">
          <Button size="small" onClick={onClose}>
            Go on
          </Button>
        </div>
      </div>
    );
  return (
    <form
      noValidate
      className="wt-choose"
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <fieldset>
        <legend className="fld-label">Take the study’s weights from</legend>
        {usable.length > 1 && (
          <Radio
            name="from"
            label={`The mean of ${formatCount(usable.length, 'shared set')}`}
            hint={listInWords(usable.map(({ name }) => name))}
            checked={from === MEAN}
            onChange={() => setFrom(MEAN)}
          />
        )}
        {usable.map((one) => (
          <Radio
            key={one.userId}
            name="from"
            label={one.mine ? `${one.name} (you)` : one.name}
            hint={setInWords(one)}
            checked={from === one.userId}
            onChange={() => setFrom(one.userId)}
          />
        ))}
        {tried && from === null && <p className="fld-error">Choose whose weights to take.</p>}
      </fieldset>
      {rest.length > 0 && (
        <p className="caption">
          Not shared:{' '}
          {listInWords(rest.map(({ name, state }) => (state === 'none' ? `${name} (none set)` : name)))}.
        </p>
      )}
      <TextArea
        label="Reason for the choice"
        hint="Shown to every member and printed in the memo."
        value={reason}
        maxLength={2_000}
        error={tried && reason.trim() === '' ? 'Write the reason for the choice.' : undefined}
        onChange={(event) => setReason(event.target.value)}
      />
      {failure && (
        <Notice fact={failure.message} requestId={failure.requestId}>
          {failure.code === 'stale'
            ? 'Look at the weights as they now are, then choose again.'
            : 'The study’s weights are as they were; your reason is still here.'}
        </Notice>
      )}
      <div className="flex gap-3">
        <Button type="submit" busy={busy}>
          Take these weights
        </Button>
        <Button kind="text" onClick={onClose}>
          Not now
        </Button>
      </div>
    </form>
  );
}

function setInWords({ set }: MemberWeights): string {
  if (!set) return '';
  const { length } = Object.values(set.shares ?? {}).filter((share) => share > 0);
  return `By ${METHOD_WAYS[set.method]}, ${formatNumber(length)} with weight; ${formatDateTimeUtc(set.updatedAt)}`;
}

type ChoiceProps = Omit<ChooseProps, 'members' | 'onClose'>;

function useChoice({ studyId, version, onChosen, onStale }: ChoiceProps) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const choose = async (from: WeightsChoice['from'], reason: string): Promise<void> => {
    setBusy(true);
    setFailure(null);
    try {
      const body = { from, reason, version };
      const saved = await send<Weights & Saved>('POST', `/api/v1/studies/${studyId}/weights/choice`, body);
      announceSaved(saved);
      onChosen();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      if (error.code === 'stale') onStale();
    } finally {
      setBusy(false);
    }
  };
  return { busy, failure, choose };
}

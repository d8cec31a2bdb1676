import { Button, Notice, Progress, Segmented } from '#components/ui/index.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { LossesSource } from '#contract/requirement.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { nameOf } from '../words.ts';
import type { Ascents } from './use-ascents.ts';
import { progressOf, timeLeft } from './words.ts';

/** Why this person may not change the losses, or not ask for flights; null where they may. */
export interface FlownLocks {
  losses: string | null;
  asking: string | null;
}

interface LossesBarProps {
  losses: LossesSource;
  onLosses: (losses: LossesSource) => void;
  /** A change is on its way, or was refused. */
  saving: boolean;
  refused: string | null;
  locks: FlownLocks;
  ascents: Ascents;
  /** The orbit looked at; null for the whole manifest. */
  orbit: InputOrbit | null;
}

const WORDS: Record<LossesSource, string> = {
  entered: 'The vehicle’s own losses, entered once: the same at every site.',
  flown: 'Each site’s own losses and payload, from its flown ascent to each orbit.',
};

function Choice({ losses, onLosses, saving, refused, locks, ascents }: LossesBarProps) {
  const obstacle = ascents.whole?.obstacle ?? null;
  const lock = locks.losses;
  return (
    <div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <span className="font-medium">Losses</span>
        <Segmented
          legend="Losses of the Δv budget"
          value={losses}
          onChange={onLosses}
          segments={[
            { value: 'entered', name: 'Entered', notYet: (losses !== 'entered' && lock) || undefined },
            {
              value: 'flown',
              name: 'Flown',
              notYet: (losses !== 'flown' && (lock ?? obstacle)) || undefined,
            },
          ]}
        />
        {saving && <span role="status">Saving the choice…</span>}
      </div>
      <p className="caption mt-2">
        {WORDS[losses]} {lock}
      </p>
      {refused && (
        <p className="caption mt-1 text-refuse" role="alert">
          {refused} The choice stands as it is shown.
        </p>
      )}
    </div>
  );
}

function AskButtons({ ascents, locks, orbit }: LossesBarProps) {
  const { whole, items, busy, ask } = ascents;
  if (!whole) return null;
  const { open, all, underWay } = progressOf(whole.counts);
  const here = items.filter(
    ({ orbitId, state }) => orbitId === orbit?.orbitId && !['current', 'waiting', 'flying'].includes(state),
  );
  const none =
    whole.obstacle ??
    locks.asking ??
    (open === 0 ? (underWay > 0 ? 'All of them are under way.' : 'All of them are current.') : undefined);
  return (
    <div className="flex flex-wrap items-center gap-2">
      {orbit && here.length > 0 && here.length < open && (
        <Button
          busy={busy}
          notYet={whole.obstacle ?? locks.asking ?? undefined}
          onClick={() => void ask(here.map(({ siteId, orbitId }) => ({ siteId, orbitId })))}
        >
          Fly {formatNumber(here.length)} to {nameOf(orbit)}
        </Button>
      )}
      <Button busy={busy} notYet={none} onClick={() => void ask()}>
        Fly {formatCount(open > 0 ? open : all, 'ascent')}
      </Button>
      {none && <span className="caption">{none}</span>}
    </div>
  );
}

function UnderWay({ ascents, locks }: LossesBarProps) {
  const { whole, busy, cancel } = ascents;
  if (!whole) return null;
  const { underWay, done, asked } = progressOf(whole.counts);
  if (underWay === 0) return null;
  return (
    <div className="mt-4">
      <Progress label={`Flying ${formatCount(underWay, 'ascent')}`} done={done} of={asked}>
        {timeLeft(whole.secondsLeft)}. You can leave this page; the results will be here.
      </Progress>
      <div className="mt-2">
        <Button size="small" busy={busy} notYet={locks.asking ?? undefined} onClick={() => void cancel()}>
          Cancel {formatCount(underWay, 'flight')}
        </Button>
      </div>
    </div>
  );
}

/** Where the losses come from, how to have the ascents flown, and how far that is. */
export function LossesBar(props: LossesBarProps) {
  const { ascents } = props;
  return (
    <section className="panel mb-8" aria-label="Losses and flown ascents">
      <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-4">
        <Choice {...props} />
        <AskButtons {...props} />
      </div>
      <UnderWay {...props} />
      {ascents.refused && (
        <p className="caption mt-2 text-refuse" role="alert">
          {ascents.refused.message}
        </p>
      )}
      {ascents.error && (
        <div className="mt-4">
          <Notice
            fact="The flown ascents could not be read."
            requestId={ascents.error.requestId}
            actions={<Button onClick={ascents.again}>Try again</Button>}
          >
            {ascents.error.message} What is being flown goes on, and what was flown is kept.
          </Notice>
        </div>
      )}
    </section>
  );
}

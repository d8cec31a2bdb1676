import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { formatCount, formatNumber } from '#contract/format.ts';
import { weighing } from '#contract/weighing.ts';
import type { WeightLevel } from '#contract/weights.ts';
import { missingPairs } from '#core/decision/judgements.ts';
import type { Siblings } from '#core/decision/statement.ts';
import type { EditorProps } from './editor.ts';
import { ratioOf, withJudgement } from './judgement.ts';
import { JudgementMatrix } from './JudgementMatrix.tsx';
import { JudgementStrip } from './JudgementStrip.tsx';
import { comparedLevels } from './statement.ts';
import { consistencyInWords, levelInWords, MOST_RATIO_OF_CONSISTENCY, nameIn } from './words.ts';

/** Level by level, two at a time: how many times one outweighs the other; and how far the judgements agree. */
export function PairwiseEditor(props: EditorProps) {
  const levels = comparedLevels(props.items);
  const grouped = props.items.some(({ groupId }) => groupId !== null);
  return (
    <div className="wt-levels">
      {levels.map((level) => (
        <section key={`${level.groupId ?? 'top'} ${level.ids.length}`}>
          <h3 className="wt-level">{levelInWords(level.groupId, props.names, grouped)}</h3>
          <PairwiseLevel {...props} level={level} />
        </section>
      ))}
    </div>
  );
}

type Pair = readonly [first: string, second: string];

function PairwiseLevel({ level, ...props }: EditorProps & { level: Siblings }) {
  const { statement, say, names, locked, items } = props;
  const { judgements } = statement;
  const pairs = level.ids.flatMap((a, at) => level.ids.slice(at + 1).map((b): Pair => [a, b]));
  const missing = missingPairs(level.ids, judgements);
  const [at, go] = useState(() =>
    Math.max(
      0,
      pairs.findIndex((pair) => same(pair, missing[0] ?? pair)),
    ),
  );
  const place = Math.min(at, pairs.length - 1);
  const [a, b] = pairs[place] ?? ['', ''];
  const show = (pair: Pair): void => go(pairs.findIndex((one) => same(one, pair)));
  const judge = (ratio: number): void =>
    say({ ...statement, judgements: withJudgement(judgements, a, b, ratio) });
  const weighed = missing.length === 0 ? weighing(items, statement).levels : [];
  const present = weighed.find(({ groupId }) => groupId === level.groupId);
  return (
    <>
      <p className="caption">
        Judgement {formatNumber(place + 1)} of {formatNumber(pairs.length)}
        {missing.length > 0 && `, ${formatNumber(missing.length)} missing`}
      </p>
      <JudgementStrip
        key={`${a} ${b}`}
        first={nameIn(names, a)}
        second={nameIn(names, b)}
        ratio={ratioOf(judgements, a, b)}
        onJudge={judge}
        locked={locked}
      />
      <div className="wt-acts">
        <Button
          size="small"
          icon="previous"
          notYet={place === 0 ? 'This is the first.' : undefined}
          onClick={() => go(place - 1)}
        >
          Previous judgement
        </Button>
        <Button
          size="small"
          icon="next"
          notYet={place === pairs.length - 1 ? 'This is the last.' : undefined}
          onClick={() => go(place + 1)}
        >
          Next judgement
        </Button>
        {missing[0] && !same(missing[0], [a, b]) && (
          <Button size="small" onClick={() => missing[0] && show(missing[0])}>
            Go to the next one missing
          </Button>
        )}
      </div>
      <JudgementMatrix
        ids={level.ids}
        names={names}
        judgements={judgements}
        weights={present?.weights ?? null}
        current={[a, b]}
        worst={disagreeing(present)}
        onShow={show}
      />
      {present && <Consistency level={present} onShow={show} {...props} />}
    </>
  );
}

const same = (one: Pair, other: Pair): boolean =>
  (one[0] === other[0] && one[1] === other[1]) || (one[0] === other[1] && one[1] === other[0]);

/** The judgement to look at again; null where judgements agree well enough. */
const disagreeing = (level: WeightLevel | undefined): Pair | null =>
  level?.consistency && (level.consistency.ratio ?? 0) > MOST_RATIO_OF_CONSISTENCY
    ? level.consistency.worst
    : null;

interface ConsistencyProps extends EditorProps {
  level: WeightLevel;
  onShow: (pair: Pair) => void;
}

function Consistency({ level, onShow, statement, names, locked }: ConsistencyProps) {
  const { consistency, ids } = level;
  if (!consistency)
    return <p className="caption">Two things cannot disagree; consistency is told from three on.</p>;
  const worst = disagreeing(level);
  return (
    <div className="wt-consistency">
      <p role="status" data-disagree={worst ? '' : undefined}>
        {consistencyInWords(level, statement.judgements, names, !locked)}
      </p>
      <p className="caption">
        λmax <span className="num">{formatNumber(consistency.lambdaMax, 3)}</span> for{' '}
        {formatCount(ids.length - level.unjudged.length, 'thing')}, consistency index{' '}
        <span className="num">{formatNumber(consistency.index, 3)}</span>, consistency ratio{' '}
        <span className="num">{formatNumber(consistency.ratio ?? 0, 3)}</span>.
      </p>
      {worst && (
        <Button size="small" onClick={() => onShow(worst)}>
          Go to {nameIn(names, worst[0])} against {nameIn(names, worst[1])}
        </Button>
      )}
    </div>
  );
}

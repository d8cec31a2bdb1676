import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import { figureText } from '#contract/rating.ts';
import { valueDecimals } from '#contract/ranking-words.ts';
import type { TornadoBarOf } from '#contract/sensitivity.ts';
import {
  dominanceInWords,
  isNow,
  secondOpinionInWords,
  weightFigure,
  type Finding,
} from '#contract/sensitivity-words.ts';
import { cell, figures, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames } from './names.ts';

/** Uncertain figures listed, widest first. */
const MOST_BARS = 20;
const FEW = 'With fewer than two ranked sites there is no lead to try.';

/** The weight at which the leader changes, one criterion a row. */
function leaderChangeTable(facts: MemoFacts): MemoTable[] {
  const { leaderChanges } = facts.sensitivity;
  if (leaderChanges === null) return [];
  const names = memoNames(facts);
  const side = (change: { weight: number; siteId: string } | null, now: number) => {
    if (change === null) return [cell('–'), cell('no change')];
    const at = isNow(change, now) ? 'now' : weightFigure(change.weight);
    return [cell(at, true), cell(names.site(change.siteId))];
  };
  return [
    table(
      'The weight at which the leader changes, the others keeping their proportions',
      [
        words('Criterion', 30, true),
        figures('Weight', 'now', 10, true),
        figures('Below', 'weight', 10, true),
        words('leads', 20),
        figures('Above', 'weight', 10, true),
        words('leads', 20),
      ],
      leaderChanges.map(({ criterionId, weight, below, above }) =>
        row([
          cell(names.lettered(criterionId)),
          cell(weightFigure(weight)),
          ...side(below, weight),
          ...side(above, weight),
        ]),
      ),
      [
        'In closed form, not by trial: where two sites’ overall values cross as one weight moves from 0 to 1.',
      ],
    ),
  ];
}

function tornadoTable(facts: MemoFacts): MemoBlock[] {
  const { tornado } = facts.sensitivity;
  if (tornado === null) return [];
  const { bars, margin } = tornado;
  if (bars.length === 0)
    return [
      {
        kind: 'paragraph',
        text: ['No ranked site has a figure with a low and a high, so none was moved by itself.'],
      },
    ];
  const names = memoNames(facts);
  const decimals = valueDecimals(facts.ranking);
  const moving = bars.filter(({ atLow, atHigh }) => atLow !== margin || atHigh !== margin);
  const still = bars.length - moving.length;
  const text = ({ criterionId }: TornadoBarOf, value: number): string => {
    const place = facts.ranking.criteria.findIndex(({ id }) => id === criterionId);
    const criterion = facts.ranking.criteria[place];
    return criterion ? figureText(criterion, value, facts.decimals[place] ?? 0) : formatNumber(value, 3);
  };
  const margins = (value: number) => cell(formatNumber(value, decimals), value < 0);
  return [
    table(
      'One figure at a time: the leader’s margin with each uncertain figure at its low and its high',
      [
        words('Site', 24, true),
        words('Criterion', 22, true),
        figures('Low', '', 9),
        figures('Likely', '', 9),
        figures('High', '', 9),
        figures('Margin', 'at low', 13, true),
        figures('Margin', 'at high', 13, true),
      ],
      moving
        .slice(0, MOST_BARS)
        .map((bar) =>
          row([
            cell(names.site(bar.siteId)),
            cell(names.lettered(bar.criterionId)),
            cell(text(bar, bar.low)),
            cell(text(bar, bar.likely)),
            cell(text(bar, bar.high)),
            margins(bar.atLow),
            margins(bar.atHigh),
          ]),
        ),
      [
        `The margin is ${formatNumber(margin, decimals)} with every figure as it is; below 0 the lead is lost. Widest first; levels stay where the likely figures put them.`,
        ...(moving.length > MOST_BARS
          ? [`${formatCount(moving.length - MOST_BARS, 'narrower one')} not listed.`]
          : []),
        ...(still > 0
          ? [
              `${formatCount(still, 'further uncertain figure')} ${still === 1 ? 'leaves' : 'leave'} the margin as it is.`,
            ]
          : []),
      ],
    ),
  ];
}

const inOne = ({ fact, behind }: Finding): string => `${fact}. ${behind}`;

/** TOPSIS and dominance, in words and with their figures. */
function otherOpinions(facts: MemoFacts): MemoBlock[] {
  const { topsis, dominance, sites } = facts.sensitivity;
  if (topsis === null || dominance === null) return [];
  const names = memoNames(facts);
  const NAMED = 6;
  const dominated = dominance.dominated
    .slice(0, NAMED)
    .map(({ siteId, by }) => `${names.site(siteId)} by ${names.site(by)}`);
  const rest = dominance.dominated.length - dominated.length;
  const who =
    dominated.length === 0
      ? ''
      : ` Dominated: ${listInWords(rest > 0 ? [...dominated, `${formatNumber(rest)} more`] : dominated)}.`;
  return [
    {
      kind: 'paragraph',
      text: [{ strong: 'Second opinion. ' }, inOne(secondOpinionInWords(sites, topsis, names))],
    },
    { kind: 'paragraph', text: [{ strong: 'Dominance. ' }, `${inOne(dominanceInWords(dominance))}${who}`] },
  ];
}

/** What would change the order: weights, figures, another method. */
export function holdBlocks(facts: MemoFacts): MemoBlock[] {
  if (facts.sensitivity.leaderChanges === null) return [{ kind: 'paragraph', text: [FEW] }];
  return [...leaderChangeTable(facts), ...tornadoTable(facts), ...otherOpinions(facts)];
}

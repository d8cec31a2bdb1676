import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import type { WeightLevel, WeightMethod, Weights } from '#contract/weights.ts';
import { cell, figures, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames, type MemoNames } from './names.ts';

const METHODS: Record<WeightMethod, string> = {
  points: 'Points were given to each criterion; a weight is its points over their sum.',
  swing:
    'Swing weights (Edwards and Barron 1994): points for the step from the worst to the best level of each criterion, the greatest step 100.',
  pairwise:
    'Pairwise comparison (Saaty 1980): each two compared on the scale 1 to 9, the weights the principal right eigenvector.',
  centroid:
    'Rank-order centroid (Barron and Barrett 1996): the criteria were put in order and nothing more was said of their distance.',
};

function originInWords({ origin }: Weights): string {
  if (!origin || origin.kind === 'apart') return 'The set is the study’s own, set apart from its members’.';
  if (origin.kind === 'member') return `The set is that of ${origin.name}, taken as it stood.`;
  const names = origin.members.map(({ name }) => name);
  return `The set is the mean of ${formatCount(names.length, 'member’s set', 'members’ sets')}: ${listInWords(names)}.`;
}

/** Group × within group, so that each weight of the table above can be multiplied out. */
function levelsTable(facts: MemoFacts, names: MemoNames): MemoTable[] {
  const { levels } = facts.weights;
  if (levels.length < 2) return [];
  const top = levels.find(({ groupId }) => groupId === null);
  const inLevel = (level: WeightLevel) =>
    level.ids.map((id) => {
      const own = level.weights?.[id] ?? 0;
      const group = level.groupId === null ? null : (top?.weights?.[level.groupId] ?? 0);
      return row([
        cell(level.groupId === null ? '–' : names.lettered(level.groupId)),
        cell(names.lettered(id)),
        cell(group === null ? '–' : formatNumber(group, 4)),
        cell(formatNumber(own, 4)),
        cell(formatNumber(own * (group ?? 1), 4), true),
      ]);
    });
  const grouped = new Set(levels.flatMap(({ groupId }) => groupId ?? []));
  const rows = levels.flatMap((level) =>
    level.groupId === null
      ? inLevel({ ...level, ids: level.ids.filter((id) => !grouped.has(id)) })
      : inLevel(level),
  );
  return [
    table(
      'Weights by group: the group’s times the criterion’s own within it',
      [
        words('Group', 26, true),
        words('Criterion', 38, true),
        figures('Group', 'weight', 12),
        figures('Within', 'sum 1 a group', 12),
        figures('Weight', 'product', 12, true),
      ],
      rows,
      [
        'Products are of the full figures; a printed one may differ in its last digit from that of the printed factors.',
      ],
    ),
  ];
}

function consistencyInWords({ weights }: MemoFacts, names: MemoNames): string[] {
  if (weights.method !== 'pairwise') return [];
  return weights.levels.flatMap(({ consistency, groupId }) => {
    if (consistency === null || consistency.ratio === null) return [];
    const { ratio, lambdaMax, worst, implied } = consistency;
    const where = groupId === null ? '' : ` within ${names.lettered(groupId)}`;
    const given = weights.judgements.find(([a, b]) => worst.includes(a) && worst.includes(b));
    const said = given && (given[0] === worst[0] ? given[2] : 1 / given[2]);
    const disagrees =
      ratio > 0.1 && said !== undefined
        ? ` Above 0.10 the judgements disagree; most of all ${names.lettered(worst[0])} against ${names.lettered(worst[1])}: ${formatNumber(said, 2)} was judged, the others imply ${formatNumber(implied, 2)}.`
        : '';
    return [
      `Consistency ratio${where} ${formatNumber(ratio, 3)} (λmax ${formatNumber(lambdaMax, 3)}).${disagrees}`,
    ];
  });
}

/** How the weights were set, by whom and why. */
export function weightBlocks(facts: MemoFacts): MemoBlock[] {
  const { weights } = facts;
  if (weights.shares === null) return [{ kind: 'paragraph', text: ['The study’s weights are not set yet.'] }];
  const names = memoNames(facts);
  const reason = weights.reason === '' ? 'No reason is written down.' : `The reason given: ${weights.reason}`;
  const unjudged = weights.levels.flatMap((level) => level.unjudged.map((id) => names.lettered(id)));
  return [
    {
      kind: 'paragraph',
      text: [
        [
          METHODS[weights.method],
          originInWords(weights),
          reason,
          ...consistencyInWords(facts, names),
          ...(unjudged.length > 0 ? [`Nothing is said of ${listInWords(unjudged)} yet: no weight.`] : []),
        ].join(' '),
      ],
    },
    ...levelsTable(facts, names),
  ];
}

import type { WeightStatement } from '#contract/weights.ts';

/** The furthest apart two things can be judged. */
export const MOST_RATIO = 9;

/** 9 … 2, 1, 1/2 … 1/9: from "the first far more" to "the second far more". */
export const RATIOS: readonly number[] = [
  ...Array.from({ length: MOST_RATIO }, (_, k) => MOST_RATIO - k),
  ...Array.from({ length: MOST_RATIO - 1 }, (_, k) => 1 / (k + 2)),
];

const DEGREES: Readonly<Record<number, string>> = {
  2: 'equally to moderately more important',
  3: 'moderately more important',
  4: 'moderately to strongly more important',
  5: 'strongly more important',
  6: 'strongly to very strongly more important',
  7: 'very strongly more important',
  8: 'very strongly to extremely more important',
  9: 'extremely more important',
};

const times = (ratio: number): number => Math.round(ratio >= 1 ? ratio : 1 / ratio);

/** 5, 1, 1/5 */
export const ratioInFigures = (ratio: number): string =>
  ratio >= 1 ? String(times(ratio)) : `1/${times(ratio)}`;

/** "Cost is strongly more important than Time" */
export function ratioInWords(ratio: number, first: string, second: string): string {
  const degree = DEGREES[times(ratio)];
  if (!degree) return `${first} and ${second} are equally important`;
  return ratio > 1 ? `${first} is ${degree} than ${second}` : `${second} is ${degree} than ${first}`;
}

type Judgements = WeightStatement['judgements'];

/** How many times a outweighs b as judged, whichever way round it was said; undefined where it was not. */
export function ratioOf(judgements: Judgements, a: string, b: string): number | undefined {
  for (const [first, second, ratio] of judgements) {
    if (first === a && second === b) return ratio;
    if (first === b && second === a) return 1 / ratio;
  }
  return undefined;
}

/** The judgements with this one in place of what was said of the pair before. */
export const withJudgement = (judgements: Judgements, a: string, b: string, ratio: number): Judgements => [
  ...judgements.filter(([x, y]) => !((x === a && y === b) || (x === b && y === a))),
  [a, b, ratio],
];

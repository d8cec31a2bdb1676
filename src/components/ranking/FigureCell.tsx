import { formatFull, formatNumber, formatShare } from '#contract/format.ts';
import { FigureMarks } from '#components/figures/FigureMarks.tsx';
import type { Known } from '#components/figures/known.ts';
import type { Contribution } from '#contract/ranking.ts';
import { NoFigure } from '#components/ui/States.tsx';

const BAR_WIDTH = 30;

interface FigureCellProps {
  contribution: Contribution;
  decimals: number;
  /** The figure fails a must-meet limit. */
  fails?: boolean;
  /** What is known of an entered figure. */
  known?: Known | undefined;
  /** The name of a rating's step, in place of its number. */
  step?: string | undefined;
}

/** A figure with its value under it: a bar of 30 px and three places. */
export function FigureCell({ contribution, decimals, fails = false, known, step }: FigureCellProps) {
  const { value } = contribution;
  return (
    <>
      <span className={fails ? 'rk-figure fails' : 'rk-figure'}>
        {fails && (
          <>
            <span aria-hidden="true">✕ </span>
            <span className="sr-only">Fails its limit: </span>
          </>
        )}
        {step === undefined ? (
          <FigureText contribution={contribution} decimals={decimals} />
        ) : (
          <span className="rk-step" title={`${step} (${contribution.figure ?? ''})`}>
            {step}
          </span>
        )}
      </span>
      {value !== null && !saysInWords(contribution) && (
        <span className="rk-value">
          {known && <FigureMarks known={known} />}
          <svg className="rk-value-bar" width={BAR_WIDTH} height="4" aria-hidden="true">
            <rect className="rk-track" width={BAR_WIDTH} height="4" />
            <rect className="rk-fill" width={BAR_WIDTH * value} height="4" />
          </svg>
          <span className="sr-only">value </span>
          {formatShare(value)}
        </span>
      )}
    </>
  );
}

/** Where nothing can be flown, words stand in place of figure and value: both count as the worst. */
export const saysInWords = ({ figure, note }: Contribution): boolean =>
  figure === null || (figure === 0 && note !== null);

/** The figure itself, or the words that stand where a number would mislead. */
export function FigureText({ contribution, decimals }: { contribution: Contribution; decimals: number }) {
  const { figure, value, note } = contribution;
  if (value === null) return note ? <span className="no-figure">{note}</span> : <NoFigure />;
  if (figure === null || saysInWords(contribution)) {
    return <span className="rk-words">{note ?? 'out of reach'}</span>;
  }
  return (
    <span title={[formatFull(figure), note].filter(Boolean).join(', ')}>
      {formatNumber(figure, decimals)}
      {note && <span className="sr-only">, {note}</span>}
    </span>
  );
}

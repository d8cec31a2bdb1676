import { formatNumber } from '#contract/format.ts';
import { letterOf } from '#contract/ranking-words.ts';
import type { Contribution } from '#contract/ranking.ts';
import { partPaint } from '#components/ui/chart.tsx';

/** The patterns are drawn once a page, under this name. */
export const PATTERNS = 'rk';

interface ValueBarProps {
  contributions: readonly Contribution[];
  names: readonly string[];
  value: number;
  /** With every missing value at its best; drawn as a dashed extension. */
  bestValue?: number | undefined;
  /** Where the leader's total stands, for the line through every row. */
  leaderValue?: number | undefined;
  width: number;
  height: number;
  /** Letters over the parts: on the first row. */
  lettered?: boolean;
  decimals: number;
}

const BAR = 17;
/** Under this width a letter would stand on its neighbour. */
const LETTER = 9;

/** A site's overall value as a bar from 0 to 1, one part a criterion, told apart by pattern and letter. */
export function ValueBar(props: ValueBarProps) {
  const { contributions, width, height, value, bestValue, leaderValue } = props;
  const at = (share: number): number => Math.round(share * (width - 2) * 10) / 10;
  const top = props.lettered ? height - BAR - 7 : (height - BAR) / 2;
  return (
    <svg
      className="chart"
      role="img"
      aria-label={partsInWords(props)}
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
    >
      <path className="grid-line" d={`M${at(0.5)} 0V${height}M${at(1)} 0V${height}`} />
      {partsOf(contributions).map(({ place, from, to }) => (
        <g key={place}>
          <rect
            x={at(from) + 0.5}
            y={top}
            width={Math.max(at(to) - at(from) - 1, 0.6)}
            height={BAR}
            {...partPaint(place, PATTERNS)}
          />
          {props.lettered && at(to) - at(from) >= LETTER && (
            <text className="tick" x={at((from + to) / 2)} y={top - 5} textAnchor="middle" aria-hidden="true">
              {letterOf(place)}
            </text>
          )}
        </g>
      ))}
      {bestValue !== undefined && bestValue > value && (
        <rect
          className="fill-missing"
          x={at(value) + 0.5}
          y={top}
          width={at(bestValue) - at(value)}
          height={BAR}
        />
      )}
      {leaderValue !== undefined && <path className="signal-line" d={`M${at(leaderValue)} 0V${height}`} />}
    </svg>
  );
}

interface Part {
  place: number;
  from: number;
  to: number;
}

function partsOf(contributions: readonly Contribution[]): Part[] {
  const parts: Part[] = [];
  let from = 0;
  contributions.forEach(({ term }, place) => {
    if (!term) return;
    parts.push({ place, from, to: from + term });
    from += term;
  });
  return parts;
}

function partsInWords({ contributions, names, value, bestValue, decimals }: ValueBarProps): string {
  const figure = (share: number): string => formatNumber(share, decimals);
  const total = bestValue === undefined ? figure(value) : `${figure(value)} to ${figure(bestValue)}`;
  const parts = contributions.map(
    ({ term }, place) => `${names[place] ?? ''} ${term === null ? 'no figure' : figure(term)}`,
  );
  return `Overall value ${total}: ${parts.join(', ')}`;
}

import type { CriterionColumn } from '#components/ranking/columns.ts';
import { formatShare } from '#contract/format.ts';
import { figureText } from '#contract/rating.ts';
import type { RankingSite } from '#contract/ranking.ts';
import { FLOOR, round, TOP, WIDTH, type Scale } from './value-plot.ts';

/** Codes stand in rows under the axis, so that neighbours do not run into each other. */
const CODE_ROWS = 4;
const CODE_STEP = 13;
const CODE_WIDTH = 24;
const MOST_NAMED = 24;

export interface Candidate {
  site: RankingSite;
  figure: number;
  value: number;
}

interface CandidatesProps {
  candidates: readonly Candidate[];
  leader: string | undefined;
  x: Scale;
  y: Scale;
}

/** Every candidate as a tick with a drop line from the value function, named where there is room. */
export function Candidates({ candidates, leader, x, y }: CandidatesProps) {
  const named = candidates.length <= MOST_NAMED;
  const rows = codeRows(candidates.map(({ figure }) => x(figure)));
  return (
    <g aria-hidden="true">
      {candidates.map(({ site, figure, value }, index) => {
        const at = round(x(figure));
        const leads = site.siteId === leader;
        const row = rows[index] ?? null;
        return (
          <g key={site.siteId}>
            <path
              className={leads ? 'signal-line' : 'grid-line'}
              d={`M${at} ${round(y(value))}V${FLOOR + 5}`}
            />
            {named && row !== null && (
              <text
                className={leads ? 'signal-text vf-code' : 'vf-code'}
                x={at}
                y={FLOOR + 17 + row * CODE_STEP}
                textAnchor="middle"
              >
                {site.code}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

/** The first row in which a code does not touch the one before it; null where all are taken: the table names them. */
export function codeRows(places: readonly number[]): (number | null)[] {
  const ends = Array.from({ length: CODE_ROWS }, () => -Infinity);
  return places.map((place) => {
    const row = ends.findIndex((end) => place - end >= CODE_WIDTH);
    if (row < 0) return null;
    ends[row] = place;
    return row;
  });
}

interface LeaderNoteProps {
  candidate: Candidate | undefined;
  column: CriterionColumn;
  x: Scale;
  y: Scale;
}

export function LeaderNote({ candidate, column, x, y }: LeaderNoteProps) {
  if (!candidate) return null;
  const at = x(candidate.figure);
  const onRight = at < WIDTH / 2;
  const figure = figureText(column.criterion, candidate.figure, column.decimals);
  return (
    <g aria-hidden="true">
      <circle className="fill-signal" cx={round(at)} cy={round(y(candidate.value))} r="4" />
      <text className="signal-text halo" x={round(at)} y={TOP - 18} textAnchor={onRight ? 'start' : 'end'}>
        {`${candidate.site.name} ${figure}, value ${formatShare(candidate.value)}`}
      </text>
    </g>
  );
}

interface CandidateTableProps {
  candidates: readonly Candidate[];
  column: CriterionColumn;
}

export function CandidateTable({ candidates, column }: CandidateTableProps) {
  const { criterion, decimals } = column;
  return (
    <table className="table" data-dense="">
      <thead>
        <tr>
          <th scope="col">Candidate site</th>
          <th scope="col" className="num">
            {criterion.name}
            <span className="unit">{criterion.steps ? 'rating 0 to 4' : criterion.unit}</span>
          </th>
          <th scope="col" className="num">
            Value<span className="unit">0 to 1</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {candidates.map(({ site, figure, value }) => (
          <tr key={site.siteId}>
            <th scope="row">{site.name}</th>
            <td className="num">{figureText(criterion, figure, decimals)}</td>
            <td className="num">{formatShare(value)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

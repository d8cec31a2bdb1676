import { scaleLinear } from 'd3-scale';
import { Chart, XAxis, YAxis } from '#components/ui/chart.tsx';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { formatNumber, formatShare } from '#contract/format.ts';
import type { RankingFigures, RankingSite } from '#contract/ranking.ts';
import { straightValue } from '#core/decision/value.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';
import { figureInWords, numbersOf } from './words.ts';

const WIDTH = 520;
const HEIGHT = 250;
const LEFT = 44;
const RIGHT = 12;
const TOP = 14;
const FLOOR = 168;
/** Codes stand in rows under the axis, so that neighbours do not run into each other. */
const CODE_ROWS = 4;
const CODE_STEP = 13;
const CODE_WIDTH = 24;
const MOST_NAMED = 24;
const HANDLE = 10;
/** Room left and right of the outermost figure, as a share of the span. */
const MARGIN = 0.06;

interface Candidate {
  site: RankingSite;
  figure: number;
  value: number;
}

interface ValueFunctionProps {
  column: CriterionColumn;
  figures: RankingFigures;
  /** Id of the leading site, to be told apart. */
  leader: string | undefined;
}

/** A criterion's value over its figure, with the candidates on it. */
export function ValueFunction({ column, figures, leader }: ValueFunctionProps) {
  const { criterion, place, decimals } = column;
  const { span } = criterion;
  const candidates = numbersOf(figures.cells, place)
    .flatMap(({ site, figure }): Candidate[] => {
      const found = figures.sites[site];
      return found ? [{ site: found, figure, value: straightValue(figure, span) }] : [];
    })
    .sort((a, b) => a.figure - b.figure);
  if (span.kind !== 'span') {
    return (
      <p className="caption">
        {span.kind === 'flat'
          ? `Every candidate has ${formatNumber(span.figure, decimals)} ${criterion.unit}: the value is 0 for all, and the criterion tells none apart.`
          : 'No candidate has a figure yet, so there is nothing to draw.'}
      </p>
    );
  }
  const ends = [span.worst, span.best, ...candidates.map(({ figure }) => figure)];
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const room = (high - low) * MARGIN;
  const x = scaleLinear([low - room, high + room], [LEFT, WIDTH - RIGHT]);
  const y = scaleLinear([0, 1], [FLOOR, TOP]);
  const ticks = x.ticks(5);
  const [first, last] = span.worst < span.best ? [span.worst, span.best] : [span.best, span.worst];
  const path = [low - room, first, last, high + room]
    .map((figure) => `${round(x(figure))} ${round(y(straightValue(figure, span)))}`)
    .join('L');
  return (
    <Chart
      label={`Value of ${criterion.name}: 0 at ${figureInWords(span.worst)}, 1 at ${figureInWords(span.best)} ${criterion.unit}, straight between.`}
      width={WIDTH}
      height={HEIGHT}
      table={<CandidateTable candidates={candidates} column={column} />}
    >
      <YAxis
        ticks={[0, 0.25, 0.5, 0.75, 1]}
        at={y}
        decimals={2}
        from={LEFT}
        to={WIDTH - RIGHT}
        labelX={LEFT - 8}
      />
      <XAxis
        ticks={ticks}
        at={x}
        decimals={decimalsNeeded(ticks)}
        from={FLOOR}
        to={FLOOR + 4}
        labelY={HEIGHT - 4}
      />
      <path className="axis" d={`M${LEFT} ${FLOOR}H${WIDTH - RIGHT}`} />
      <Candidates candidates={candidates} leader={leader} x={x} y={y} />
      <path className="line" d={`M${path}`} />
      {[span.worst, span.best].map((level) => (
        <rect
          key={level}
          className="candidate"
          x={round(x(level)) - HANDLE / 2}
          y={round(y(straightValue(level, span))) - HANDLE / 2}
          width={HANDLE}
          height={HANDLE}
        />
      ))}
      <LeaderNote
        candidate={candidates.find(({ site }) => site.siteId === leader)}
        decimals={decimals}
        x={x}
        y={y}
      />
    </Chart>
  );
}

type Scale = (value: number) => number;

const round = (place: number): number => Math.round(place * 10) / 10;

interface CandidatesProps {
  candidates: readonly Candidate[];
  leader: string | undefined;
  x: Scale;
  y: Scale;
}

function Candidates({ candidates, leader, x, y }: CandidatesProps) {
  const named = candidates.length <= MOST_NAMED;
  const rows = codeRows(candidates.map(({ figure }) => x(figure)));
  return (
    <g aria-hidden="true">
      {candidates.map(({ site, figure, value }, index) => {
        const at = round(x(figure));
        const leads = site.siteId === leader;
        return (
          <g key={site.siteId}>
            <path
              className={leads ? 'signal-line' : 'grid-line'}
              d={`M${at} ${round(y(value))}V${FLOOR + 5}`}
            />
            {named && (
              <text
                className={leads ? 'signal-text vf-code' : 'vf-code'}
                x={at}
                y={FLOOR + 17 + (rows[index] ?? 0) * CODE_STEP}
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

/** The first row in which a code does not touch the one before it; where all are taken, the one with most room. */
function codeRows(places: readonly number[]): number[] {
  const ends = Array.from({ length: CODE_ROWS }, () => -Infinity);
  return places.map((place) => {
    const free = ends.findIndex((end) => place - end >= CODE_WIDTH);
    const row = free >= 0 ? free : ends.indexOf(Math.min(...ends));
    ends[row] = place;
    return row;
  });
}

interface LeaderNoteProps {
  candidate: Candidate | undefined;
  decimals: number;
  x: Scale;
  y: Scale;
}

function LeaderNote({ candidate, decimals, x, y }: LeaderNoteProps) {
  if (!candidate) return null;
  const at = x(candidate.figure);
  const onRight = at < WIDTH / 2;
  const text = `${candidate.site.name} ${formatNumber(candidate.figure, decimals)}, value ${formatShare(candidate.value)}`;
  return (
    <g aria-hidden="true">
      <circle className="fill-signal" cx={round(at)} cy={round(y(candidate.value))} r="4" />
      <text
        className="signal-text halo"
        x={round(at) + (onRight ? 10 : -10)}
        y={Math.max(round(y(candidate.value)) - 8, TOP)}
        textAnchor={onRight ? 'start' : 'end'}
      >
        {text}
      </text>
    </g>
  );
}

function CandidateTable({
  candidates,
  column,
}: {
  candidates: readonly Candidate[];
  column: CriterionColumn;
}) {
  return (
    <table className="table" data-dense="">
      <thead>
        <tr>
          <th scope="col">Candidate site</th>
          <th scope="col" className="num">
            {column.criterion.name}
            <span className="unit">{column.criterion.unit}</span>
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
            <td className="num">{formatNumber(figure, column.decimals)}</td>
            <td className="num">{formatShare(value)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

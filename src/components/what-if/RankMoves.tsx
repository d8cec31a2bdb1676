import { Chart } from '#components/ui/chart.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import { hasMoved, shownMoves, type RankMove } from '#contract/what-if-model.ts';
import { moveInWords, standingInWords } from '#contract/what-if-words.ts';
import { layOut, type MoveLine, type Spot } from './moves-layout.ts';

const CURVE = { moved: 'line wi-moved', stays: 'line-2', leads: 'signal-line wi-leads' } as const;

/** Where each site stands in the study and in the what-if: circles with the rank, a curve between them. */
export function RankMoves({ moves, narrow }: { moves: readonly RankMove[]; narrow: boolean }) {
  const shown = shownMoves(moves);
  const { lines, gaps, width, height, left, right } = layOut(shown, narrow);
  return (
    <>
      <Chart
        label={movesInWords(moves)}
        width={width}
        height={height}
        table={<MovesTable moves={shown} total={moves.length} />}
      >
        <text className="label-2" x={left.at} y="12" textAnchor="middle">
          Study
        </text>
        <text className="label-2" x={right.at} y="12" textAnchor="middle">
          What-if
        </text>
        {lines.map((line) => (
          <path
            key={line.move.siteId}
            className={`${CURVE[line.kind]}${line.ends ? 'dashed' : ''}`}
            fill="none"
            d={`M${left.at} ${line.from.y}C${line.bend} ${line.from.y} ${line.bend} ${line.to.y} ${right.at} ${line.to.y}`}
          />
        ))}
        {gaps.map(({ x, y, between }) => (
          <text key={`${x} ${y}`} className="tick" x={x} y={y} textAnchor="middle">
            {formatCount(between, 'more')}
          </text>
        ))}
        {lines.map((line) => (
          <g key={line.move.siteId} className={line.kind === 'leads' ? 'strong' : undefined}>
            <title>{`${line.move.name}: ${moveInWords(line.move)}`}</title>
            <Circle spot={line.from} line={line} />
            <Circle spot={line.to} line={line} />
            <EndName
              x={left.name}
              y={line.from.y}
              anchor="end"
              text={narrow ? line.move.code : line.from.label}
              line={line}
            />
            <EndName x={right.name} y={line.to.y} anchor="start" text={line.to.label} line={line} />
          </g>
        ))}
      </Chart>
      {shown.length < moves.length && (
        <p className="caption mt-2">
          {formatNumber(shown.length)} of {formatNumber(moves.length)} sites: the first twelve of either
          order, and those that moved most.
        </p>
      )}
    </>
  );
}

function Circle({ spot, line }: { spot: Spot; line: MoveLine }) {
  const { x, y, half, text, mark } = spot;
  const leads = line.kind === 'leads' && mark !== 'out';
  return (
    <>
      <rect
        className={leads ? 'fill-signal' : mark === 'ranked' ? 'wi-circle' : 'wi-circle dashed'}
        x={x - half}
        y={y - 12}
        width={2 * half}
        height="24"
        rx="12"
      />
      {mark === 'aside' && <path className="wi-slash" d={`M${x - 7} ${y + 7}L${x + 7} ${y - 7}`} />}
      <text className={leads ? 'figure wi-on-signal' : 'figure'} x={x} y={y + 4} textAnchor="middle">
        {text}
      </text>
    </>
  );
}

interface EndNameProps {
  x: number;
  y: number;
  anchor: 'start' | 'end';
  text: string;
  line: MoveLine;
}

function EndName({ x, y, anchor, text, line }: EndNameProps) {
  return (
    <text className={line.kind === 'stays' ? 'label-2' : undefined} x={x} y={y + 4} textAnchor={anchor}>
      {text}
    </text>
  );
}

function movesInWords(moves: readonly RankMove[]): string {
  const moved = moves.filter(hasMoved);
  if (moved.length === 0) return `Rank moves: all ${formatCount(moves.length, 'site')} stay where they are.`;
  const named = moved.slice(0, 4).map((move) => `${move.name} ${moveInWords(move)}`);
  const rest = moved.length - named.length;
  const all = rest > 0 ? [...named, formatCount(rest, 'more')] : named;
  return `Rank moves: ${listInWords(all)}; ${formatNumber(moves.length - moved.length)} stay.`;
}

function MovesTable({ moves, total }: { moves: readonly RankMove[]; total: number }) {
  const caption = `Rank moves, ${formatNumber(moves.length)} of ${formatCount(total, 'site')}`;
  return (
    <TableScroll label={caption}>
      <table className="table" data-dense="">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            <th scope="col">Candidate site</th>
            <th scope="col" className="num">
              In the study
            </th>
            <th scope="col" className="num">
              In the what-if
            </th>
            <th scope="col">Move</th>
          </tr>
        </thead>
        <tbody>
          {moves.map((move) => (
            <tr key={move.siteId}>
              <th scope="row">{move.name}</th>
              <td className="num">{standingInWords(move.before)}</td>
              <td className="num">{standingInWords(move.after)}</td>
              <td>{moveInWords(move)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

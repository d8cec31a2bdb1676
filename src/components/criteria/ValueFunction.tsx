import { Chart, XAxis, YAxis } from '#components/ui/chart.tsx';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { RATING_STEPS, type CriterionShape } from '#contract/criterion.ts';
import { figureText } from '#contract/rating.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import { valueOf } from '#core/decision/value.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';
import { CandidateTable, Candidates, LeaderNote, type Candidate } from './Candidates.tsx';
import { ShapeHandles } from './ShapeHandles.tsx';
import {
  FLOOR,
  HEIGHT,
  LEFT,
  linePath,
  plotOf,
  RIGHT,
  round,
  straightPath,
  WIDTH,
  type Plot,
} from './value-plot.ts';
import { figureInWords, numbersOf, shapeInWords } from './words.ts';

const HANDLE = 10;

/** How a shape is changed on its drawing; left out where it may not be. */
export interface ShapeEdit {
  /** The shape as it is being moved; nothing is saved yet. */
  onDraw: (shape: CriterionShape) => void;
  /** The hand is off it: what is drawn is meant. */
  onSettle: () => void;
}

interface ValueFunctionProps {
  column: CriterionColumn;
  figures: RankingFigures;
  /** As drawn, saved or not. */
  shape: CriterionShape;
  /** Id of the leading site, to be told apart. */
  leader: string | undefined;
  edit?: ShapeEdit | undefined;
}

/** A criterion's value over its figure, with the candidates on it. */
export function ValueFunction({ column, figures, shape, leader, edit }: ValueFunctionProps) {
  const { criterion, place, decimals } = column;
  const { span } = criterion;
  const candidates = numbersOf(figures.cells, place)
    .flatMap(({ site, figure }): Candidate[] => {
      const found = figures.sites[site];
      return found ? [{ site: found, figure, value: valueOf(figure, span, shape) }] : [];
    })
    .sort((a, b) => a.figure - b.figure);
  if (span.kind !== 'span') {
    return (
      <p className="caption">
        {span.kind === 'flat'
          ? `Every candidate has ${figureText(criterion, span.figure, decimals)} ${criterion.unit}: the value is 0 for all, and the criterion tells none apart.`
          : 'No candidate has a figure yet, so there is nothing to draw.'}
      </p>
    );
  }
  const plot = plotOf(
    span,
    candidates.map(({ figure }) => figure),
  );
  const { x, y } = plot;
  return (
    <>
      <div className="vf-plot">
        <Chart
          label={`Value of ${criterion.name}: 0 at ${figureInWords(span.worst)}, 1 at ${figureInWords(span.best)} ${criterion.unit}, ${shapeInWords(shape, { span, unit: criterion.unit })}.`}
          width={WIDTH}
          height={HEIGHT}
        >
          <Axes plot={plot} rating={criterion.steps !== null} />
          <Candidates candidates={candidates} leader={leader} x={x} y={y} />
          {shape.kind !== 'straight' && <path className="line-2 dashed" d={straightPath(plot, span)} />}
          <path className="line" d={linePath(plot, span, shape)} />
          {[
            { figure: span.worst, value: 0 },
            { figure: span.best, value: 1 },
          ].map(({ figure, value }) => (
            <rect
              key={value}
              className="vf-end"
              x={round(x(figure)) - HANDLE / 2}
              y={round(y(value)) - HANDLE / 2}
              width={HANDLE}
              height={HANDLE}
            />
          ))}
          <LeaderNote
            candidate={candidates.find(({ site }) => site.siteId === leader)}
            column={column}
            x={x}
            y={y}
          />
        </Chart>
        {edit && <ShapeHandles plot={plot} levels={span} shape={shape} unit={criterion.unit} edit={edit} />}
      </div>
      {shape.kind !== 'straight' && (
        <p className="caption">
          Dashed: straight, for comparison.
          {edit && (
            <>
              {' '}
              <span className="vf-wide">
                Drag a handle, or move it with the arrow keys: 1 % a press, with Shift 0.1 %.
              </span>
              <span className="vf-narrow">Dragging needs a wider screen; type the figures below.</span>
            </>
          )}
        </p>
      )}
      <details className="chart-as-table">
        <summary>As a table</summary>
        <CandidateTable candidates={candidates} column={column} />
      </details>
    </>
  );
}

const STEPS = Array.from({ length: RATING_STEPS }, (_, step) => step);

function Axes({ plot: { x, y }, rating }: { plot: Plot; rating: boolean }) {
  const ticks = rating ? STEPS : x.ticks(5);
  return (
    <>
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
    </>
  );
}

import { Button, Segmented } from '#components/ui/index.ts';
import { MOST_CURVATURE, type CriterionShape } from '#contract/criterion.ts';
import type { WeighedCriterion } from '#contract/ranking.ts';
import { formatNumber, MINUS } from '#contract/format.ts';
import { FigureField } from './FigureField.tsx';
import { PointsTable } from './PointsTable.tsx';
import { addKnot, canAddKnot, middleOf, shapeAs, type ShapeKind } from './shape-editing.ts';
import { figureInWords } from './words.ts';

interface ShapeFieldsProps {
  shape: CriterionShape;
  unit: string;
  /** What its value runs between now; undefined before its figures have been read. */
  span: WeighedCriterion['span'] | undefined;
  error: string | undefined;
  /** The shape as it is meant: it is drawn and saved. */
  onChange: (shape: CriterionShape) => void;
}

const HINTS: Record<ShapeKind, string> = {
  straight: 'Each step from the worst to the best level adds as much value as the next.',
  piecewise: 'Straight between points. They lie between the levels, and move with them.',
  exponential:
    'One curvature c: above 0 the first steps from the worst level count most, below 0 the last ones; 0 is straight.',
};

/** How value grows between the levels: the choice, and the typed twin of what is dragged. */
export function ShapeFields(props: ShapeFieldsProps) {
  const { shape, error, onChange } = props;
  return (
    <div className="cr-shape">
      <p className="fld-label">Value between the levels</p>
      <Segmented
        legend="Value between the levels"
        value={shape.kind}
        onChange={(kind) => onChange(shapeAs(kind, shape))}
        segments={[
          { value: 'straight', name: 'Straight' },
          { value: 'piecewise', name: 'Points' },
          { value: 'exponential', name: 'Curve' },
        ]}
      />
      <p className="fld-hint">{HINTS[shape.kind]}</p>
      {error && <p className="fld-error">{error}</p>}
      {shape.kind === 'piecewise' && <Points {...props} shape={shape} />}
      {shape.kind === 'exponential' && (
        <Curvature curvature={shape.curvature} onChange={(curvature) => onChange({ ...shape, curvature })} />
      )}
    </div>
  );
}

type Piecewise = Extract<CriterionShape, { kind: 'piecewise' }>;

function Points({ shape, unit, span, onChange }: ShapeFieldsProps & { shape: Piecewise }) {
  const change = (knots: Piecewise['knots']): void => onChange({ kind: 'piecewise', knots });
  if (span?.kind !== 'span')
    return (
      <p className="caption">
        The points can be typed once there are two levels to put them between: different figures, or fixed
        levels.
      </p>
    );
  return (
    <>
      <PointsTable knots={shape.knots} levels={span} unit={unit} onChange={change} />
      <div className="mt-3">
        <Button
          size="small"
          icon="add"
          notYet={canAddKnot(shape.knots) ? undefined : 'A value function has up to five points.'}
          onClick={() => change(addKnot(shape.knots))}
        >
          Add point
        </Button>
      </div>
    </>
  );
}

interface CurvatureProps {
  curvature: number;
  onChange: (curvature: number) => void;
}

function Curvature({ curvature, onChange }: CurvatureProps) {
  return (
    <div className="cr-curvature">
      <FigureField
        label="Curvature c"
        shown={figureInWords(curvature)}
        hint={`Half way the value is ${formatNumber(middleOf({ kind: 'exponential', curvature }), 3)}.`}
        fault={(value) =>
          Math.abs(value) <= MOST_CURVATURE
            ? null
            : `A curvature lies between ${MINUS}${MOST_CURVATURE} and ${MOST_CURVATURE}.`
        }
        onRead={onChange}
      />
    </div>
  );
}

import type { Criterion } from '#contract/criterion.ts';
import type { WeighedCriterion } from '#contract/ranking.ts';
import { PointsTable } from './PointsTable.tsx';
import { directionInWords, figureInWords, limitInWords, shapeInWords } from './words.ts';

interface SettingsListProps {
  criterion: Criterion;
  span: WeighedCriterion['span'] | undefined;
  /** Name of its group. */
  group: string | undefined;
}

/** A criterion's settings in words, for those who may not change them. */
export function CriterionSettingsList({ criterion, span, group }: SettingsListProps) {
  const { levels, shape, steps, unit } = criterion;
  if (criterion.source === 'text') return null;
  return (
    <>
      {shape.kind === 'piecewise' && span?.kind === 'span' && (
        <PointsTable knots={shape.knots} levels={span} unit={unit} />
      )}
      <dl className="cr-settings">
        <dt>Direction</dt>
        <dd>{directionInWords(criterion.direction)}</dd>
        {steps && (
          <>
            <dt>Steps</dt>
            <dd>{steps.map((name, step) => `${name} (${step})`).join(', ')}</dd>
          </>
        )}
        <dt>Group</dt>
        <dd>{group ?? 'none'}</dd>
        <dt>Levels</dt>
        <dd>
          {levels.mode === 'fixed'
            ? `fixed, worst ${figureInWords(levels.worst)}, best ${figureInWords(levels.best)} ${unit}`.trim()
            : 'from the candidates'}
        </dd>
        <dt>Value</dt>
        <dd>{shapeInWords(shape, span?.kind === 'span' ? { span, unit } : undefined)}</dd>
        <dt>Must-meet limit</dt>
        <dd>{limitInWords(criterion)}</dd>
      </dl>
    </>
  );
}

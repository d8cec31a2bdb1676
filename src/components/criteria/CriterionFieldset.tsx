import type { UseFormReturn } from 'react-hook-form';
import { asTypedNumber, NumberField, Segmented, TextField } from '#components/ui/index.ts';
import type { Criterion } from '#contract/criterion.ts';
import type { WeighedCriterion } from '#contract/ranking.ts';
import { stepInWords } from '#contract/rating.ts';
import { keepsUnit, type CriterionFields } from './criterion-form.ts';
import { GroupField } from './GroupField.tsx';
import { RatingSteps } from './RatingSteps.tsx';
import type { Groups } from './use-groups.ts';
import { figureInWords } from './words.ts';

interface FieldsetProps {
  form: UseFormReturn<CriterionFields>;
  values: CriterionFields;
  criterion: Criterion;
  groups: Groups;
  /** What its value runs between now; undefined before its figures have been read. */
  span: WeighedCriterion['span'] | undefined;
  /** A field was left, or a choice made. */
  onLeave: () => void;
}

/** Name, unit, a rating's steps, group, direction, levels and limit of a criterion. */
export function CriterionFieldset(props: FieldsetProps) {
  const { form, criterion, onLeave } = props;
  const { errors } = form.formState;
  return (
    <div className="cr-fields">
      <TextField label="Name" error={errors.name} {...form.register('name', { onBlur: onLeave })} />
      {keepsUnit(criterion) ? (
        <TextField
          label="Unit"
          value={criterion.source === 'rating' ? 'rating, 0 to 4' : criterion.unit}
          readOnly
          hint={criterion.source === 'rating' ? 'A rating has its steps.' : 'Computed: the unit is fixed.'}
        />
      ) : (
        <TextField
          label="Unit"
          optional
          error={errors.unit}
          {...form.register('unit', { onBlur: onLeave })}
        />
      )}
      {criterion.source !== 'text' && (
        <>
          {criterion.source === 'rating' && <StepNames {...props} />}
          <GroupField
            groups={props.groups}
            value={props.values.group}
            error={errors.group?.message}
            onChange={(group) => {
              form.setValue('group', group);
              onLeave();
            }}
          />
          <DirectionChoice {...props} />
          <LevelFields {...props} />
          <LimitFields {...props} />
        </>
      )}
    </div>
  );
}

function StepNames({ form, values, onLeave }: FieldsetProps) {
  return (
    <RatingSteps
      fieldOf={(step) => form.register(`steps.${step}`, { onBlur: onLeave })}
      errorOf={(step) => form.formState.errors.steps?.[step]}
      worstFirst={values.direction === 'more'}
    />
  );
}

/** What a typed step of a rating is called. */
function readingOf({ steps }: Criterion, typed: number | string | undefined): string | undefined {
  return typeof typed === 'number' ? (stepInWords({ steps }, typed) ?? undefined) : undefined;
}

function DirectionChoice({ form, values, onLeave }: FieldsetProps) {
  const turn = (direction: CriterionFields['direction']): void => {
    form.setValue('direction', direction);
    // The better end trades places with the worse one, else fixed levels would run against the direction.
    const { worst, best } = form.getValues();
    form.setValue('worst', best);
    form.setValue('best', worst);
    onLeave();
  };
  return (
    <div className="cr-wide">
      <p className="fld-label">Direction</p>
      <Segmented
        legend="Direction"
        value={values.direction}
        onChange={turn}
        segments={[
          { value: 'more', name: 'More is better' },
          { value: 'less', name: 'Less is better' },
        ]}
      />
    </div>
  );
}

function LevelFields({ form, values, criterion, span, onLeave }: FieldsetProps) {
  const { errors } = form.formState;
  const choose = (mode: CriterionFields['levelMode']): void => {
    form.setValue('levelMode', mode);
    if (mode === 'fixed' && span?.kind === 'span' && form.getValues('worst') === undefined) {
      form.setValue('worst', span.worst);
      form.setValue('best', span.best);
    }
    onLeave();
  };
  return (
    <>
      <div className="cr-wide">
        <p className="fld-label">Levels, where the value is 0 and 1</p>
        <Segmented
          legend="Levels"
          value={values.levelMode}
          onChange={choose}
          segments={[
            { value: 'candidates', name: 'From the candidates' },
            { value: 'fixed', name: 'Fixed' },
          ]}
        />
        <p className="fld-hint">
          {values.levelMode === 'fixed'
            ? 'Fixed levels keep values comparable when sites come and go; figures beyond them count as 0 or 1.'
            : `Lowest and highest figure of all sites${spanInWords(span, criterion.unit)}. A site that comes or goes can move them, and so turn the order of two others: fix them once they are agreed.`}
        </p>
      </div>
      {values.levelMode === 'fixed' && (
        <>
          <NumberField
            label="Worst level, value 0"
            unit={criterion.unit}
            reading={readingOf(criterion, values.worst)}
            error={errors.worst}
            {...form.register('worst', { ...asTypedNumber, onBlur: onLeave })}
          />
          <NumberField
            label="Best level, value 1"
            unit={criterion.unit}
            reading={readingOf(criterion, values.best)}
            error={errors.best}
            {...form.register('best', { ...asTypedNumber, onBlur: onLeave })}
          />
        </>
      )}
    </>
  );
}

function LimitFields({ form, values, criterion, onLeave }: FieldsetProps) {
  const choose = (kind: CriterionFields['limitKind']): void => {
    form.setValue('limitKind', kind);
    if (kind === 'none' || form.getValues('limitValue') !== undefined) onLeave();
  };
  return (
    <>
      <div className="cr-wide">
        <p className="fld-label">Must-meet limit</p>
        <Segmented
          legend="Must-meet limit"
          value={values.limitKind}
          onChange={choose}
          segments={[
            { value: 'none', name: 'None' },
            { value: 'at-least', name: 'At least' },
            { value: 'at-most', name: 'At most' },
          ]}
        />
        <p className="fld-hint">
          A site that fails a limit is set aside: listed with the reason, and given no rank.
        </p>
      </div>
      {values.limitKind !== 'none' && (
        <NumberField
          label={values.limitKind === 'at-least' ? 'At least' : 'At most'}
          unit={criterion.unit}
          reading={readingOf(criterion, values.limitValue)}
          error={form.formState.errors.limitValue}
          {...form.register('limitValue', { ...asTypedNumber, onBlur: onLeave })}
        />
      )}
    </>
  );
}

function spanInWords(span: FieldsetProps['span'], unit: string): string {
  if (span?.kind !== 'span') return '';
  return `, now ${figureInWords(span.worst)} and ${figureInWords(span.best)} ${unit}`.trimEnd();
}

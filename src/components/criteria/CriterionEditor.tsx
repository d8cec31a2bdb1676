import { useMemo, useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { useAutosave } from '#components/requirement/autosave.ts';
import { SaveTrouble } from '#components/requirement/SaveTrouble.tsx';
import { useKeptValues } from '#components/requirement/use-kept-values.ts';
import { Button, ConfirmDialog, messageOf, Panel } from '#components/ui/index.ts';
import type { Criterion, CriterionShape } from '#contract/criterion.ts';
import { formatCount } from '#contract/format.ts';
import type { RankingFigures, WeighedCriterion } from '#contract/ranking.ts';
import {
  changesOf,
  CRITERION_FIELDS,
  fieldsOf,
  readCriterion,
  settingsNow,
  type CriterionFields,
} from './criterion-form.ts';
import { CriterionFieldset } from './CriterionFieldset.tsx';
import { CriterionSettingsList } from './CriterionSettingsList.tsx';
import { ShapeFields } from './ShapeFields.tsx';
import type { Groups } from './use-groups.ts';
import { useHistory } from './use-history.ts';
import { ValueFunction } from './ValueFunction.tsx';
import { figureInWords, limitInWords, numbersOf, shapeInWords } from './words.ts';

interface EditorProps {
  studyId: string;
  criterion: Criterion;
  groups: Groups;
  column: CriterionColumn | undefined;
  figures: RankingFigures | null;
  leader: string | undefined;
  /** Why it cannot be changed; undefined where it can. */
  locked: string | undefined;
  onKept: (criterion: Criterion) => void;
  onRemove: () => void;
}

/** One criterion: its value function drawn, and its settings, each saved on leaving its field. */
export function CriterionEditor(props: EditorProps) {
  const { criterion, column, figures, locked } = props;
  return (
    <Panel title={criterion.name} caption={locked ?? 'Every change is saved as you leave its field.'}>
      {criterion.source === 'text' && (
        <p className="caption">
          A column of text: it is kept and shown with the sites, and not weighed. Its texts cannot be ranked.
        </p>
      )}
      {locked ? (
        <>
          {criterion.source !== 'text' && column && figures && (
            <ValueFunction column={column} figures={figures} shape={criterion.shape} leader={props.leader} />
          )}
          <CriterionSettingsList
            criterion={criterion}
            span={column?.criterion.span}
            group={props.groups.items.find(({ id }) => id === criterion.groupId)?.name}
          />
        </>
      ) : (
        <EditorForm {...props} />
      )}
    </Panel>
  );
}

function EditorForm(props: EditorProps) {
  const { studyId, criterion, groups, column, figures, onKept, onRemove } = props;
  const fields = useMemo(() => fieldsOf(criterion), [criterion]);
  const form = useForm<CriterionFields>({ defaultValues: fields });
  const values = useWatch({ control: form.control }) as CriterionFields;
  const [asking, setAsking] = useState(false);
  const history = useHistory();
  const autosave = useAutosave<Criterion>({
    kept: criterion,
    write: (change, version) =>
      send<Criterion & Saved>('PATCH', `/api/v1/studies/${studyId}/criteria/${criterion.id}`, {
        ...change,
        version,
      }),
    onKept,
  });
  const basedOn = useKeptValues(form, fields, autosave.settled);
  const leave = (): void => {
    const read = readCriterion(form.getValues());
    for (const field of CRITERION_FIELDS) {
      const message = read.ok ? undefined : read.errors.find((error) => error.field === field)?.message;
      if (message === undefined) form.clearErrors(field);
      else form.setError(field, { message });
    }
    if (!read.ok) return;
    const change = changesOf(criterion, read.settings);
    if (Object.keys(change).length === 0) return;
    const before = readCriterion(basedOn());
    history.note(settingsNow(criterion, change), change);
    autosave.save(change, before.ok ? before.settings : {});
  };
  const draw = (shape: CriterionShape): void => form.setValue('shape', shape);
  const undo = (): void => {
    const step = history.takeLast();
    if (step) autosave.save(step.before, step.after);
  };
  const held = figures && column ? numbersOf(figures.cells, column.place).length : 0;
  return (
    <form noValidate onSubmit={(event) => event.preventDefault()}>
      {criterion.source !== 'text' && (
        <>
          {column && figures && (
            <ValueFunction
              column={column}
              figures={figures}
              shape={values.shape}
              leader={props.leader}
              edit={{ onDraw: draw, onSettle: leave }}
            />
          )}
          <ShapeFields
            shape={values.shape}
            unit={criterion.unit}
            span={column?.criterion.span}
            error={messageOf(form.formState.errors.shape as { message?: string } | undefined)}
            onChange={(shape) => {
              draw(shape);
              leave();
            }}
          />
        </>
      )}
      <div className="mt-4">
        <Button
          size="small"
          icon="undo"
          notYet={history.empty ? 'Nothing has been changed here yet.' : undefined}
          onClick={undo}
        >
          Undo last change
        </Button>
      </div>
      <div className="mt-5">
        <CriterionFieldset
          form={form}
          values={values}
          criterion={criterion}
          groups={groups}
          span={column?.criterion.span}
          onLeave={leave}
        />
      </div>
      <SaveTrouble
        autosave={autosave}
        what={criterion.name}
        describe={(version, changed) =>
          changed.map((field) => (
            <span key={field} className="block">
              <span className="font-sans text-sm">{LABELS[field] ?? field}</span>{' '}
              {inWords(version, field, { groups, span: column?.criterion.span, unit: criterion.unit })}
            </span>
          ))
        }
      />
      <div className="mt-5">
        <Button kind="destructive" size="small" icon="remove" onClick={() => setAsking(true)}>
          Remove {criterion.name}
        </Button>
      </div>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        onConfirm={() => {
          setAsking(false);
          onRemove();
        }}
        title={`Remove ${criterion.name}?`}
        confirm={`Remove ${criterion.name}`}
        destructive
      >
        {criterion.source === 'computed'
          ? 'Its weight goes to the other criteria in proportion. It can be added again, since its figures are computed.'
          : `Its ${formatCount(held, 'figure')} and its weight go with it. The record keeps them; the screen does not bring them back.`}
      </ConfirmDialog>
    </form>
  );
}

const LABELS: Partial<Record<keyof Criterion, string>> = {
  name: 'Name',
  unit: 'Unit',
  direction: 'Direction',
  levels: 'Levels',
  limit: 'Limit',
  shape: 'Value between the levels',
  groupId: 'Group',
  steps: 'Steps',
};

interface Surroundings {
  groups: Groups;
  span: WeighedCriterion['span'] | undefined;
  unit: string;
}

function inWords(
  version: Partial<Criterion>,
  field: keyof Criterion,
  { groups, span, unit: keptUnit }: Surroundings,
): string {
  const { limit = null, unit = keptUnit, steps = null, shape, levels, groupId } = version;
  if (field === 'limit') return limitInWords({ limit, unit, steps });
  if (field === 'shape')
    return shape ? shapeInWords(shape, span?.kind === 'span' ? { span, unit: keptUnit } : undefined) : '';
  if (field === 'steps') return (steps ?? []).join(', ');
  if (field === 'groupId') return groups.items.find(({ id }) => id === groupId)?.name ?? 'none';
  if (field !== 'levels') return String(version[field] ?? '');
  return levels?.mode === 'fixed'
    ? `${figureInWords(levels.worst)} to ${figureInWords(levels.best)}`
    : 'from the candidates';
}

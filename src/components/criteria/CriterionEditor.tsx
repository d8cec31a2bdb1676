import { useMemo, useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { useAutosave } from '#components/requirement/autosave.ts';
import { SaveTrouble } from '#components/requirement/SaveTrouble.tsx';
import { useKeptValues } from '#components/requirement/use-kept-values.ts';
import { Button, ConfirmDialog, Panel } from '#components/ui/index.ts';
import type { Criterion } from '#contract/criterion.ts';
import { formatCount } from '#contract/format.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import {
  changesOf,
  CRITERION_FIELDS,
  fieldsOf,
  readCriterion,
  type CriterionFields,
} from './criterion-form.ts';
import { CriterionFieldset } from './CriterionFieldset.tsx';
import { ValueFunction } from './ValueFunction.tsx';
import { directionInWords, figureInWords, limitInWords, numbersOf } from './words.ts';

interface EditorProps {
  studyId: string;
  criterion: Criterion;
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
      {criterion.source === 'text' ? (
        <p className="caption">
          A column of text: it is kept and shown with the sites, and not weighed. Its texts cannot be ranked.
        </p>
      ) : (
        column && figures && <ValueFunction column={column} figures={figures} leader={props.leader} />
      )}
      {locked ? <Settings criterion={criterion} /> : <EditorForm {...props} />}
    </Panel>
  );
}

/** The settings in words, for those who may not change them. */
function Settings({ criterion }: { criterion: Criterion }) {
  const { levels } = criterion;
  return (
    <dl className="cr-settings">
      <dt>Direction</dt>
      <dd>{directionInWords(criterion.direction)}</dd>
      <dt>Levels</dt>
      <dd>
        {levels.mode === 'fixed'
          ? `fixed, worst ${figureInWords(levels.worst)}, best ${figureInWords(levels.best)} ${criterion.unit}`
          : 'from the candidates'}
      </dd>
      <dt>Must-meet limit</dt>
      <dd>{limitInWords(criterion)}</dd>
    </dl>
  );
}

function EditorForm({ studyId, criterion, column, figures, onKept, onRemove }: EditorProps) {
  const fields = useMemo(() => fieldsOf(criterion), [criterion]);
  const form = useForm<CriterionFields>({ defaultValues: fields });
  const values = useWatch({ control: form.control }) as CriterionFields;
  const [asking, setAsking] = useState(false);
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
    autosave.save(change, before.ok ? before.settings : {});
  };
  const held = figures && column ? numbersOf(figures.cells, column.place).length : 0;
  return (
    <form noValidate className="mt-5" onSubmit={(event) => event.preventDefault()}>
      <CriterionFieldset
        form={form}
        values={values}
        criterion={criterion}
        span={column?.criterion.span}
        onLeave={leave}
      />
      <SaveTrouble autosave={autosave} what={criterion.name} describe={describe} />
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
};

function describe(version: Partial<Criterion>, fields: readonly (keyof Criterion)[]) {
  return fields.map((field) => (
    <span key={field} className="block">
      <span className="font-sans text-sm">{LABELS[field] ?? field}</span> {inWords(version, field)}
    </span>
  ));
}

function inWords(version: Partial<Criterion>, field: keyof Criterion): string {
  if (field === 'limit') return limitInWords({ limit: version.limit ?? null, unit: version.unit ?? '' });
  if (field === 'direction') return version.direction ?? '';
  if (field !== 'levels') return String(version[field] ?? '');
  return version.levels?.mode === 'fixed'
    ? `${figureInWords(version.levels.worst)} to ${figureInWords(version.levels.best)}`
    : 'from the candidates';
}

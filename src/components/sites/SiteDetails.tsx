import { useEffect, useEffectEvent, useState } from 'react';
import { useForm } from 'react-hook-form';
import { ApiError } from '#components/live/api.ts';
import { FigureSheet } from '#components/figures/FigureSheet.tsx';
import { knownWords } from '#components/figures/known.ts';
import { useApi } from '#components/live/hooks.ts';
import { Button } from '#components/ui/Button.tsx';
import { NumberField, Select, TextArea, TextField, type Choice } from '#components/ui/Field.tsx';
import { SideSheet } from '#components/ui/SideSheet.tsx';
import { Notice } from '#components/ui/States.tsx';
import type { Criterion } from '#contract/criterion.ts';
import { formatFull, readTypedNumber } from '#contract/format.ts';
import type { List } from '#contract/list.ts';
import { SiteNotes, type ChangedSite, type Site, type SitePatch } from '#contract/site.ts';
import { DetailsConflict } from './DetailsConflict.tsx';
import { CELL_NAMES, CELLS, cellText, readCell, type CellKey } from './read-site.ts';

interface DetailsProps {
  studyId: string;
  site: Site;
  locked: string | null;
  onClose: () => void;
  onSave: (site: Site, patch: SitePatch) => Promise<Site>;
  /** Shows the site as someone else left it. */
  onKeep: (site: Site) => void;
}

type Typed = Record<CellKey, string> & { notes: string; values: Record<string, string> };

function typedOf(site: Site, criteria: readonly Criterion[]): Typed {
  const cells = Object.fromEntries(CELLS.map((key) => [key, cellText(site, key)])) as Record<CellKey, string>;
  const values = criteria.map(({ id }) => {
    const value = site.values[id];
    return [id, typeof value === 'number' ? formatFull(value) : (value ?? '')];
  });
  return { ...cells, notes: site.notes, values: Object.fromEntries(values) as Record<string, string> };
}

/** Only what differs, so that two people who change different fields don't stand in each other's way. */
function patchOf(typed: Typed, before: Typed, criteria: readonly Criterion[]): SitePatch {
  const cells = CELLS.filter((key) => typed[key] !== before[key]).map((key) => readCell(key, typed[key]));
  const patch: SitePatch = Object.assign(
    {},
    ...cells.map((reading) => (reading.kind === 'read' ? reading.value : {})),
  );
  if (typed.notes !== before.notes) patch.notes = typed.notes;
  const changed = criteria.filter(({ id }) => typed.values[id] !== before.values[id]);
  if (changed.length > 0)
    patch.values = Object.fromEntries(
      changed.map(({ id, source }) => {
        const text = typed.values[id] ?? '';
        if (text.trim() === '') return [id, null];
        return [id, source === 'text' ? text : Number(readTypedNumber(text))];
      }),
    );
  return patch;
}

/** One site whole, at the side: its fields, its notes and the figures entered for it. */
export function SiteDetails(props: DetailsProps) {
  const { data, error } = useApi<List<Criterion>>(`/api/v1/studies/${props.studyId}/criteria?pageSize=500`);
  const entered = data?.items.filter(({ source }) => source !== 'computed');
  // What is typed rests on the site as it was opened, whatever arrives meanwhile: a save then meets the conflict.
  const [base, setBase] = useState(props.site);
  const [figure, setFigure] = useState<Criterion | null>(null);
  return (
    <>
      <SideSheet open onClose={props.onClose} title={props.site.name}>
        {error && <Notice fact="The criteria could not be read.">{error.message}</Notice>}
        {entered && (
          <DetailsForm
            key={`${base.id}/${base.version}`}
            {...props}
            site={base}
            latest={props.site}
            onLatest={() => setBase(props.site)}
            criteria={entered}
            onFigure={setFigure}
          />
        )}
      </SideSheet>
      {figure && (
        <FigureSheet
          studyId={props.studyId}
          siteId={props.site.id}
          siteName={props.site.name}
          criterion={figure}
          locked={props.locked ?? undefined}
          onClose={() => setFigure(null)}
        />
      )}
    </>
  );
}

interface FormProps extends DetailsProps {
  criteria: readonly Criterion[];
  /** The site as it is now; taken over while nothing is typed. */
  latest: Site;
  onLatest: () => void;
  /** Opens a figure's own sheet. */
  onFigure: (criterion: Criterion) => void;
}

function DetailsForm({
  onFigure,
  site,
  criteria,
  locked,
  onSave,
  onKeep,
  onClose,
  latest,
  onLatest,
}: FormProps) {
  const before = typedOf(site, criteria);
  const { register, formState, handleSubmit, setError } = useForm<Typed>({
    defaultValues: before,
    mode: 'onBlur',
    reValidateMode: 'onBlur',
  });
  const { errors, isSubmitting, isDirty } = formState;
  const takeLatest = useEffectEvent(onLatest);
  const moved = latest.id !== site.id || (latest.version !== site.version && !isDirty && !isSubmitting);
  useEffect(() => {
    if (moved) takeLatest();
  }, [moved]);
  const [conflict, setConflict] = useState<{ patch: SitePatch; current: ChangedSite } | null>(null);
  const save = async (onto: Site, patch: SitePatch) => {
    setConflict(null);
    try {
      if (Object.keys(patch).length > 0) await onSave(onto, patch);
      onClose();
    } catch (failure) {
      if (!(failure instanceof ApiError)) throw failure;
      if (failure.code === 'stale') {
        setConflict({ patch, current: failure.current as ChangedSite });
        return;
      }
      const { path, message } = failure.errors[0] ?? { path: '', message: failure.message };
      const field = [...CELLS, 'notes' as const].find((key) => key === path);
      const entered = criteria.find(({ id }) => path === `values.${id}`);
      setError(field ?? (entered ? `values.${entered.id}` : 'root'), { message });
    }
  };
  const submit = handleSubmit((typed) => save(site, patchOf(typed, before, criteria)));
  const cellRule = (key: CellKey) => ({
    validate: (text: string) => {
      const reading = readCell(key, text);
      return reading.kind === 'read' || reading.message;
    },
  });
  return (
    <form className="site-details" onSubmit={(event) => void submit(event)} noValidate>
      {CELLS.map((key) => (
        <TextField
          key={key}
          label={CELL_NAMES[key]}
          unit={unitOf(key)}
          readOnly={locked !== null}
          error={errors[key]}
          {...register(key, cellRule(key))}
        />
      ))}
      <TextArea
        label="Notes"
        optional
        readOnly={locked !== null}
        error={errors.notes}
        {...register('notes', {
          validate: (text) => SiteNotes.safeParse(text).success || 'Notes have up to 2,000 characters.',
        })}
      />
      {criteria.map((criterion) => {
        const { id, name, unit, source, steps } = criterion;
        const rule = {
          validate: (text: string) =>
            source === 'text' ||
            text.trim() === '' ||
            typeof readTypedNumber(text) === 'number' ||
            `${name} takes a number.`,
        };
        const looks = { label: name, optional: true, readOnly: locked !== null, error: errors.values?.[id] };
        const field = register(`values.${id}`, rule);
        if (source === 'text') return <TextField key={id} {...looks} {...field} />;
        return (
          <div key={id}>
            {source === 'rating' ? (
              <Select {...looks} disabled={locked !== null} choices={stepChoices(steps)} {...field} />
            ) : (
              <NumberField {...looks} unit={unit || undefined} {...field} />
            )}
            <button type="button" className="fig-more" onClick={() => onFigure(criterion)}>
              {figureWords(site, id)}
              <span className="sr-only"> of {name}</span>
            </button>
          </div>
        );
      })}
      {errors.root && (
        <Notice fact="The site was not saved.">{errors.root.message} What you typed is still here.</Notice>
      )}
      {conflict && (
        <DetailsConflict
          {...conflict}
          criteria={criteria}
          onKeepTheirs={() => onKeep(conflict.current)}
          onPutYours={() => void save(conflict.current, conflict.patch)}
        />
      )}
      <Button type="submit" busy={isSubmitting} notYet={locked ?? undefined}>
        Save {site.code}
      </Button>
    </form>
  );
}

const stepChoices = (steps: readonly string[] | null): Choice[] => [
  { value: '', name: 'No figure' },
  ...(steps ?? []).map((step, at) => ({ value: String(at), name: `${step} (${at})` })),
];

/** What is known of a figure, as the way to more: "Low 250 and high 360; source: Port office". */
function figureWords(site: Site, criterionId: string): string {
  const words = knownWords({ particulars: site.particulars[criterionId] ?? {}, files: 0 });
  return words === ''
    ? 'Low, high, source and evidence'
    : words.replace(/^./, (letter) => letter.toUpperCase());
}

const unitOf = (key: CellKey): string | undefined =>
  key === 'code' || key === 'name' ? undefined : key === 'elevationM' ? 'm' : '°';

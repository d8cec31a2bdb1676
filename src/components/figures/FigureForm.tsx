import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { ApiError } from '#components/live/api.ts';
import { Button } from '#components/ui/Button.tsx';
import { Conflict } from '#components/ui/Conflict.tsx';
import { NumberField, Select, TextArea, TextField } from '#components/ui/Field.tsx';
import { Notice } from '#components/ui/States.tsx';
import { toast } from '#components/ui/Toast.tsx';
import type { Criterion } from '#contract/criterion.ts';
import type { ChangedSite, Site } from '#contract/site.ts';
import { entryOf, entryWords, sameEntry, type Entry } from './figure.ts';
import { readTyped, typedOf, TYPED_FIELDS, type TypedFigure } from './figure-form.ts';
import { writeFigure } from './write-figure.ts';

interface FigureFormProps {
  studyId: string;
  site: Site;
  criterion: Criterion;
  locked: string | undefined;
  onSaved: (site: Site, entry: Entry) => void;
  /** Shows the site as someone else left it. */
  onTake: (site: Site) => void;
}

const CONFIDENCE = [
  { value: '', name: 'Not said' },
  { value: 'low', name: 'Low' },
  { value: 'medium', name: 'Medium' },
  { value: 'high', name: 'High' },
];

/** An entered figure's fields: checked when one is left and on saving; the text stays whatever becomes of it. */
export function FigureForm({ studyId, site, criterion, locked, onSaved, onTake }: FigureFormProps) {
  const before = entryOf(site, criterion.id);
  const { register, formState, handleSubmit, setError, clearErrors, getValues } = useForm<TypedFigure>({
    defaultValues: typedOf(before),
  });
  const { errors, isSubmitting } = formState;
  const [conflict, setConflict] = useState<{ entry: Entry; current: ChangedSite } | null>(null);
  const rating = criterion.source === 'rating';

  const read = (typed: TypedFigure): Entry | null => {
    clearErrors();
    const reading = readTyped(typed, criterion);
    if (reading.kind === 'read') return reading.entry;
    for (const { field, message } of reading.faults) setError(field, { message });
    return null;
  };
  const put = async (onto: Site, entry: Entry): Promise<void> => {
    setConflict(null);
    const written = await writeFigure(studyId, onto, criterion.id, entry);
    if (written.kind === 'stale') setConflict({ entry, current: written.current });
    else if (written.kind === 'refused') showRefusal(written.error);
    else {
      toast(`${criterion.name} of ${site.name} saved.`);
      onSaved(written.site, entry);
    }
  };
  const showRefusal = (error: ApiError): void => {
    const { path, message } = error.errors[0] ?? { path: '', message: error.message };
    const part = path.split('.').at(-1);
    const field =
      TYPED_FIELDS.find((one) => one === part) ?? (path.startsWith('values.') ? 'figure' : 'root');
    setError(field, { message });
  };
  const submit = handleSubmit(async (typed) => {
    const entry = read(typed);
    if (entry && !sameEntry(entry, before)) await put(site, entry);
  });
  const left = { onBlur: () => void read(getValues()) };
  const looks = { readOnly: locked !== undefined };
  const field = (name: keyof TypedFigure) => ({ ...register(name, left), error: errors[name] });
  const steps = [
    { value: '', name: 'No figure' },
    ...(criterion.steps ?? []).map((step, at) => ({ value: String(at), name: `${step} (${at})` })),
  ];
  const figureField = (name: 'figure' | 'low' | 'high', label: string) =>
    rating ? (
      <Select label={label} choices={steps} disabled={locked !== undefined} {...field(name)} />
    ) : (
      <NumberField label={label} unit={criterion.unit || undefined} {...looks} {...field(name)} />
    );
  return (
    <form className="fig-form" onSubmit={(event) => void submit(event)} noValidate>
      {figureField('figure', 'Figure')}
      <div className="fig-pair">
        {figureField('low', 'Low')}
        {figureField('high', 'High')}
      </div>
      <TextArea label="Source" hint="Who says so, and where" rows={2} {...looks} {...field('source')} />
      <div className="fig-pair">
        <TextField label="Date of the figure" hint="Such as 2026-11-30" {...looks} {...field('date')} />
        <Select
          label="Confidence"
          choices={CONFIDENCE}
          disabled={locked !== undefined}
          {...field('confidence')}
        />
      </div>
      {errors.root && (
        <Notice fact="The figure was not saved.">{errors.root.message} What you typed is still here.</Notice>
      )}
      {conflict && (
        <Conflict
          what={`${criterion.name} of ${site.name}`}
          yours={entryWords(conflict.entry, criterion)}
          theirs={entryWords(entryOf(conflict.current, criterion.id), criterion)}
          by={conflict.current.changedBy ?? undefined}
          at={conflict.current.changedAt ?? undefined}
          keepTheirs="Keep theirs"
          putYours="Put yours"
          onKeepTheirs={() => onTake(conflict.current)}
          onPutYours={() => void put(conflict.current, conflict.entry)}
        />
      )}
      {locked === undefined && (
        <Button type="submit" busy={isSubmitting}>
          Save the figure of {site.code}
        </Button>
      )}
    </form>
  );
}

import { useState } from 'react';
import { Controller } from 'react-hook-form';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { Button, Dialog, Notice, Select, TextField, useContractForm } from '#components/ui/index.ts';
import { Radio } from '#components/ui/Check.tsx';
import { MAX_PAGE_SIZE } from '#contract/list.ts';
import { StudyInput, type Study, type StudyList } from '#contract/study.ts';

interface NewStudyProps {
  open: boolean;
  /** The study to copy, where a row's Copy was pressed. */
  copyOf: Study | null;
  onClose: () => void;
}

/** A new study: blank, from the example, or a copy. On success the page goes to it. */
export function NewStudyDialog({ open, copyOf, onClose }: NewStudyProps) {
  if (!open) return null;
  return <NewStudyForm key={copyOf?.id ?? ''} copyOf={copyOf} onClose={onClose} />;
}

const ORIGINS = [
  { value: 'blank', label: 'Blank', hint: 'Everything is yours to write.' },
  {
    value: 'example',
    label: 'From the example',
    hint: 'An invented operator’s study, complete from requirement to weights: to look round in, or to change.',
  },
] as const;

function NewStudyForm({ copyOf, onClose }: Omit<NewStudyProps, 'open'>) {
  const [failure, setFailure] = useState<ApiError | null>(null);
  const form = useContractForm(StudyInput, {
    title: copyOf ? `Copy of ${copyOf.title}` : '',
    from: copyOf?.id ?? 'blank',
  });
  const { errors, isSubmitting } = form.formState;
  const make = form.handleSubmit(async (input) => {
    setFailure(null);
    try {
      const made = await send<Study>('POST', '/api/v1/studies', input);
      location.assign(`/studies/${made.id}/requirement`);
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
    }
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title="New study"
      actions={
        <>
          <Button kind="text" onClick={onClose}>
            Not now
          </Button>
          <Button kind="primary" busy={isSubmitting} onClick={() => void make()}>
            Make study
          </Button>
        </>
      }
    >
      <form className="mt-3 grid gap-4 text-ink" onSubmit={(event) => void make(event)} noValidate>
        <TextField
          label="Title"
          hint="What is to be decided, in a few words"
          maxLength={160}
          error={errors.title}
          {...form.register('title')}
        />
        <Controller
          control={form.control}
          name="from"
          render={({ field }) => (
            <Origin value={field.value ?? 'blank'} onChange={field.onChange} copyOf={copyOf} />
          )}
        />
        {failure && (
          <Notice fact={failure.message} requestId={failure.requestId}>
            No study was made; the title is still here.
          </Notice>
        )}
      </form>
    </Dialog>
  );
}

interface OriginProps {
  /** "blank", "example" or a study's id. */
  value: string;
  onChange: (from: string) => void;
  copyOf: Study | null;
}

function Origin({ value, onChange, copyOf }: OriginProps) {
  const { data } = useApi<StudyList>(`/api/v1/studies?archived=all&pageSize=${MAX_PAGE_SIZE}`);
  const studies = data?.items ?? (copyOf ? [copyOf] : []);
  const copies = value !== 'blank' && value !== 'example';
  return (
    <fieldset className="grid gap-2">
      <legend className="fld-label">Made from</legend>
      {ORIGINS.map((origin) => (
        <Radio
          key={origin.value}
          name="origin"
          label={origin.label}
          hint={origin.hint}
          checked={value === origin.value}
          onChange={() => onChange(origin.value)}
        />
      ))}
      <Radio
        name="origin"
        label="A copy of another study"
        hint={
          studies.length > 0
            ? 'Requirement, vehicle, sites with their figures, criteria and the study’s weights; no people, no history.'
            : 'There is no study of yours to copy yet.'
        }
        disabled={studies.length === 0}
        checked={copies}
        onChange={() => onChange(studies[0]?.id ?? 'blank')}
      />
      {copies && (
        <div className="pl-6">
          <Select
            label="Study to copy"
            choices={studies.map(({ id, title }) => ({ value: id, name: title }))}
            value={value}
            onChange={(event) => onChange(event.target.value)}
          />
        </div>
      )}
    </fieldset>
  );
}

import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import {
  Button,
  Notice,
  Segmented,
  Select,
  showServerErrors,
  SideSheet,
  TextField,
  useContractForm,
} from '#components/ui/index.ts';
import {
  ComputedInput,
  DEFAULT_STEPS,
  EnteredInput,
  RatingInput,
  type Criterion,
  type CriterionDraft,
} from '#contract/criterion.ts';
import type { z } from '#contract/zod.ts';
import { QUANTITIES, QUANTITY_KEYS, quantityName } from '#contract/quantity.ts';
import { RatingSteps } from './RatingSteps.tsx';

export interface OrbitChoice {
  id: string;
  name: string;
}

interface AddProps {
  studyId: string;
  orbits: readonly OrbitChoice[];
  onAdded: (criterion: Criterion) => void;
  onClose: () => void;
}

/** A new criterion: computed from flight mechanics, or entered or rated for each site. Nothing is saved until it is added. */
export function AddCriterion(props: AddProps) {
  const [source, setSource] = useState<'computed' | 'entered' | 'rating'>('computed');
  return (
    <SideSheet open onClose={props.onClose} title="New criterion">
      <Segmented
        legend="Source"
        value={source}
        onChange={setSource}
        segments={[
          { value: 'computed', name: 'Computed' },
          { value: 'entered', name: 'Entered number' },
          { value: 'rating', name: 'Rating' },
        ]}
      />
      {source === 'computed' && <ComputedForm {...props} />}
      {source === 'entered' && <EnteredForm {...props} />}
      {source === 'rating' && <RatingForm {...props} />}
    </SideSheet>
  );
}

/** Posts a new criterion; what is refused is kept for the form to show. */
function useAdding({ studyId, onAdded }: AddProps) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const add = async (draft: CriterionDraft): Promise<ApiError | null> => {
    setBusy(true);
    setFailure(null);
    try {
      const made = await send<Criterion & Saved>('POST', `/api/v1/studies/${studyId}/criteria`, draft);
      announceSaved({ revision: made.revision, savedAt: made.savedAt });
      onAdded(made);
      return null;
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      setBusy(false);
      return error;
    }
  };
  return { add, busy, failure };
}

function Refusal({ failure }: { failure: ApiError | null }) {
  return failure === null ? null : (
    <div className="mt-4">
      <Notice fact={failure.message} requestId={failure.requestId}>
        Nothing was added. The fields are as you left them.
      </Notice>
    </div>
  );
}

const MANIFEST = '';

function ComputedForm(props: AddProps) {
  const { add, busy, failure } = useAdding(props);
  const form = useContractForm(ComputedInput, {
    source: 'computed',
    quantity: 'payload-per-year',
    orbitId: null,
  });
  const quantity = form.watch('quantity');
  const { scope, unit, overManifest } = QUANTITIES[quantity];
  const overManifestInWords = scope === 'either' ? `for the manifest: ${overManifest}` : overManifest;
  const orbits = props.orbits.map(({ id, name }) => ({ value: id, name }));
  const orbitId = form.watch('orbitId') ?? null;
  const orbitName = props.orbits.find(({ id }) => id === orbitId)?.name ?? null;
  const submit = form.handleSubmit(async (input) => {
    const refused = await add(input);
    if (refused) showServerErrors<z.input<typeof ComputedInput>>(refused, ['name', 'orbitId'], form.setError);
  });
  return (
    <form noValidate className="mt-5 grid gap-4" onSubmit={(event) => void submit(event)}>
      <Select
        label="Quantity"
        hint={[unit, overManifestInWords].filter(Boolean).join('; ')}
        choices={QUANTITY_KEYS.map((key) => ({ value: key, name: QUANTITIES[key].name }))}
        {...form.register('quantity', { onChange: () => form.setValue('orbitId', null) })}
      />
      {scope !== 'manifest' && (
        <Select
          label="For"
          error={form.formState.errors.orbitId}
          choices={[
            { value: MANIFEST, name: scope === 'either' ? 'The whole manifest' : 'Choose a target orbit' },
            ...orbits,
          ]}
          {...form.register('orbitId', {
            setValueAs: (value: unknown) => (value === MANIFEST ? null : value),
          })}
        />
      )}
      <TextField
        label="Name"
        optional
        hint={`Left out: ${quantityName(quantity, orbitName)}`}
        error={form.formState.errors.name}
        {...form.register('name', { setValueAs: (value: unknown) => (value === '' ? undefined : value) })}
      />
      <Refusal failure={failure} />
      <AddButtons busy={busy} onClose={props.onClose} />
    </form>
  );
}

function EnteredForm(props: AddProps) {
  const { add, busy, failure } = useAdding(props);
  const form = useContractForm(EnteredInput, { source: 'entered', name: '', unit: '', direction: 'more' });
  const submit = form.handleSubmit(async (input) => {
    const refused = await add(input);
    if (refused) showServerErrors<z.input<typeof EnteredInput>>(refused, ['name', 'unit'], form.setError);
  });
  return (
    <form noValidate className="mt-5 grid gap-4" onSubmit={(event) => void submit(event)}>
      <TextField label="Name" error={form.formState.errors.name} {...form.register('name')} />
      <TextField
        label="Unit"
        optional
        hint="M€, days, km"
        error={form.formState.errors.unit}
        {...form.register('unit')}
      />
      <div>
        <p className="fld-label">Direction</p>
        <Segmented
          legend="Direction"
          value={form.watch('direction')}
          onChange={(value) => form.setValue('direction', value)}
          segments={[
            { value: 'more', name: 'More is better' },
            { value: 'less', name: 'Less is better' },
          ]}
        />
      </div>
      <p className="caption">
        Its figures are entered in Sites, cell by cell, or come with a CSV of the same heading.
      </p>
      <Refusal failure={failure} />
      <AddButtons busy={busy} onClose={props.onClose} />
    </form>
  );
}

function RatingForm(props: AddProps) {
  const { add, busy, failure } = useAdding(props);
  const form = useContractForm(RatingInput, { source: 'rating', name: '', steps: DEFAULT_STEPS });
  const submit = form.handleSubmit(async (input) => {
    const refused = await add(input);
    if (refused) showServerErrors<z.input<typeof RatingInput>>(refused, ['name'], form.setError);
  });
  const { errors } = form.formState;
  return (
    <form noValidate className="mt-5 grid gap-4" onSubmit={(event) => void submit(event)}>
      <TextField label="Name" error={errors.name} {...form.register('name')} />
      <RatingSteps
        fieldOf={(step) => form.register(`steps.${step}`)}
        errorOf={(step) => errors.steps?.[step]}
        worstFirst
      />
      <p className="caption">
        A site takes one of the five steps, 0 to 4; a higher step is better. Its ratings are given in Sites,
        cell by cell, or come with a CSV of the same heading.
      </p>
      <Refusal failure={failure} />
      <AddButtons busy={busy} onClose={props.onClose} />
    </form>
  );
}

function AddButtons({ busy, onClose }: { busy: boolean; onClose: () => void }) {
  return (
    <div className="flex gap-3">
      <Button type="submit" kind="primary" busy={busy}>
        Add criterion
      </Button>
      <Button kind="text" onClick={onClose}>
        Not now
      </Button>
    </div>
  );
}

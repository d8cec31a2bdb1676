import { useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { ApiError, send } from '#components/live/api.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import { Button, Notice, SideSheet } from '#components/ui/index.ts';
import { DEFAULT_PARKING_KM } from '#contract/orbit.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { checkForm } from './orbit-errors.ts';
import type { OrbitFields } from './orbit-form.ts';
import { OrbitFieldset } from './OrbitFieldset.tsx';

interface AddProps {
  studyId: string;
  /** A code that is free. */
  code: string;
  onAdded: (orbit: StudyOrbit) => void;
  onClose: () => void;
}

const blank = (code: string): OrbitFields => ({
  code,
  name: '',
  perigeeKm: undefined,
  apogeeKm: undefined,
  inclinationDeg: undefined,
  sunSynchronous: false,
  profile: 'auto',
  parkingKm: DEFAULT_PARKING_KM,
  flightsPerYear: 0,
});

/** A new orbit for the manifest: nothing is saved until it is added. */
export function AddOrbit({ studyId, code, onAdded, onClose }: AddProps) {
  const form = useForm<OrbitFields>({ defaultValues: blank(code) });
  const reached = useRef(new Set<keyof OrbitFields>());
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const add = async () => {
    const input = checkForm(form);
    if (!input) return;
    setBusy(true);
    setFailure(null);
    try {
      const made = await send<StudyOrbit & Saved>('POST', `/api/v1/studies/${studyId}/orbits`, input);
      announceSaved({ revision: made.revision, savedAt: made.savedAt });
      onAdded(made);
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      setBusy(false);
    }
  };
  return (
    <SideSheet open onClose={onClose} title="New target orbit">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void add();
        }}
      >
        <OrbitFieldset form={form} onLeave={(field) => checkForm(form, reached.current.add(field))} />
        {failure && (
          <div className="mt-4">
            <Notice fact={failure.message} requestId={failure.requestId}>
              {failure.errors.map(({ message }) => message).join(' ')} The fields are as you left them.
            </Notice>
          </div>
        )}
        <div className="mt-5 flex gap-3">
          <Button type="submit" kind="primary" busy={busy}>
            Add orbit
          </Button>
          <Button kind="text" onClick={onClose}>
            Not now
          </Button>
        </div>
      </form>
    </SideSheet>
  );
}

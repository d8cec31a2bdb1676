import { useMemo } from 'react';
import { useForm } from 'react-hook-form';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import { SideSheet } from '#components/ui/index.ts';
import { formatFull } from '#contract/format.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { useAutosave } from './autosave.ts';
import { checkForm } from './orbit-errors.ts';
import { changesOf, fieldsOf, ORBIT_LABELS, patchOf, type OrbitFields } from './orbit-form.ts';
import { OrbitFieldset } from './OrbitFieldset.tsx';
import { SaveTrouble } from './SaveTrouble.tsx';
import { useKeptValues } from './use-kept-values.ts';
import { nameOfOrbit } from './words.ts';

interface EditProps {
  studyId: string;
  orbit: StudyOrbit;
  onKept: (orbit: StudyOrbit) => void;
  onClose: () => void;
}

const inWords = (value: StudyOrbit[keyof StudyOrbit] | undefined): string => {
  if (typeof value === 'number') return formatFull(value);
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return value || 'nothing';
};

function describe(version: Partial<StudyOrbit>, fields: readonly (keyof StudyOrbit)[]) {
  return fields.map((field) => (
    <span key={field} className="block">
      <span className="font-sans text-sm">
        {field in ORBIT_LABELS ? ORBIT_LABELS[field as keyof OrbitFields] : field}
      </span>{' '}
      {inWords(version[field])}
    </span>
  ));
}

/** One orbit of the manifest in a side sheet; every field is saved on leaving it, once the orbit is whole. */
export function EditOrbit({ studyId, orbit, onKept, onClose }: EditProps) {
  const fields = useMemo(() => fieldsOf(orbit), [orbit]);
  const form = useForm<OrbitFields>({ defaultValues: fields });
  const autosave = useAutosave<StudyOrbit>({
    kept: orbit,
    write: (change, version) =>
      send<StudyOrbit & Saved>(
        'PATCH',
        `/api/v1/studies/${studyId}/orbits/${orbit.id}`,
        patchOf(change, version),
      ),
    onKept,
  });
  const basedOn = useKeptValues(form, fields, autosave.settled);
  const leave = () => {
    const input = checkForm(form);
    if (!input) return;
    const change = changesOf(orbit, input);
    if (Object.keys(change).length === 0) return;
    const { inclinationDeg = null, ...others } = basedOn();
    autosave.save(change, { ...others, inclinationDeg } as Partial<StudyOrbit>);
  };
  return (
    <SideSheet open onClose={onClose} title={`Orbit ${nameOfOrbit(orbit)}`}>
      <form noValidate onSubmit={(event) => event.preventDefault()}>
        <OrbitFieldset form={form} onLeave={leave} />
      </form>
      <SaveTrouble autosave={autosave} what="this orbit" describe={describe} />
    </SideSheet>
  );
}

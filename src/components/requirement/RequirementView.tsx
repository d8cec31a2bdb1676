import { useCallback } from 'react';
import { useApi, useFinding } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { inputLock } from '#components/studies/lock.ts';
import { ButtonLink, Finding } from '#components/ui/index.ts';
import { MAX_PAGE_SIZE } from '#contract/list.ts';
import type {
  LibraryVehicle,
  OrbitList,
  StudyOrbit,
  StudySettings,
  StudyVehicle,
} from '#contract/requirement.ts';
import type { Study } from '#contract/study.ts';
import { ManifestPanel } from './ManifestPanel.tsx';
import { QuestionPanel } from './QuestionPanel.tsx';
import { SettingsPanel } from './SettingsPanel.tsx';
import { VehiclePanel } from './VehiclePanel.tsx';
import { outstanding, requirementFinding } from './words.ts';

export interface RequirementProps {
  study: Study;
  orbits: StudyOrbit[];
  vehicle: StudyVehicle;
  settings: StudySettings;
  library: LibraryVehicle[];
}

/** Reads one resource of the study, starting from what the page drew. */
function useKept<T>(address: string, fallbackData: T) {
  const { data = fallbackData, mutate } = useApi<T>(address, { fallbackData, revalidateOnMount: false });
  const keep = useCallback((next: T) => void mutate(next, { revalidate: false }), [mutate]);
  const again = useCallback(() => mutate(), [mutate]);
  return { data, keep, again };
}

/** Everything the sheet shows, kept up to date with what others save. */
function useRequirement(initial: RequirementProps) {
  const address = `/api/v1/studies/${initial.study.id}`;
  const study = useKept<Study>(address, initial.study);
  const orbits = useKept<OrbitList>(`${address}/orbits?pageSize=${MAX_PAGE_SIZE}`, {
    items: initial.orbits,
    total: initial.orbits.length,
  });
  const vehicle = useKept<StudyVehicle>(`${address}/vehicle`, initial.vehicle);
  const settings = useKept<StudySettings>(`${address}/settings`, initial.settings);
  const { again: studyAgain } = study;
  const { again: orbitsAgain } = orbits;
  const { again: vehicleAgain } = vehicle;
  const { again: settingsAgain } = settings;
  const hear = useCallback(
    (event: LiveEvent) => {
      const touched = (object: string) => event.kind === 'gap' || event.change.objects.includes(object);
      if (touched('study')) void studyAgain();
      if (touched('orbit')) void orbitsAgain();
      if (touched('vehicle')) void vehicleAgain();
      if (touched('settings')) void settingsAgain();
    },
    [studyAgain, orbitsAgain, vehicleAgain, settingsAgain],
  );
  useStudyEvents(initial.study.id, hear);
  return { study, orbits, vehicle, settings };
}

/** What is asked for: the question, the launch manifest, the vehicle and the settings. */
export function RequirementView(props: RequirementProps) {
  const { study, orbits, vehicle, settings } = useRequirement(props);
  const studyId = props.study.id;
  const manifest = orbits.data.items;
  const lock = inputLock(study.data);
  const locked = lock !== undefined;
  const written = { question: study.data.question, orbits: manifest, vehicle: vehicle.data };
  const finding = requirementFinding(written);
  useFinding(finding);
  const keepOrbit = (next: StudyOrbit) =>
    orbits.keep({
      ...orbits.data,
      items: manifest.map((orbit) => (orbit.id === next.id ? next : orbit)),
    });
  return (
    <>
      <Finding
        why={lock ?? outstanding(written) ?? study.data.question}
        actions={<ButtonLink href={`/studies/${studyId}/members`}>Members</ButtonLink>}
      >
        {finding}
      </Finding>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-10">
        <QuestionPanel study={study.data} onKept={study.keep} locked={locked} />
        <ManifestPanel
          studyId={studyId}
          orbits={manifest}
          onKept={keepOrbit}
          onChanged={orbits.again}
          locked={locked}
        />
        <VehiclePanel
          studyId={studyId}
          kept={vehicle.data}
          onKept={vehicle.keep}
          library={props.library}
          orbits={manifest}
          turnSpeedFraction={settings.data.turnSpeedFraction}
          locked={locked}
        />
        <SettingsPanel studyId={studyId} kept={settings.data} onKept={settings.keep} locked={locked} />
      </div>
    </>
  );
}

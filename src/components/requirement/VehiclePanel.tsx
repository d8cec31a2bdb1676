import { useState, type ReactNode } from 'react';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import { Button, ConfirmDialog, EmptyState, Panel, Select } from '#components/ui/index.ts';
import type { LibraryVehicle, StudyOrbit, StudyVehicle } from '#contract/requirement.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { VehicleForm } from '#components/vehicle/VehicleForm.tsx';
import { useAutosave } from './autosave.ts';
import { PayloadCheck } from './PayloadCheck.tsx';
import { SaveTrouble } from './SaveTrouble.tsx';
import { differencesOf } from './vehicle-differences.tsx';
import { shortName } from './words.ts';

interface VehicleProps {
  studyId: string;
  kept: StudyVehicle;
  onKept: (next: StudyVehicle) => void;
  library: readonly LibraryVehicle[];
  orbits: readonly StudyOrbit[];
  turnSpeedFraction: number;
  locked: boolean;
}

interface TakeProps {
  library: readonly LibraryVehicle[];
  kept: StudyVehicle;
  onTake: (entry: LibraryVehicle) => void;
}

/** Choosing from the library; a vehicle that would be replaced is asked about first. */
function TakeFromLibrary({ library, kept, onTake }: TakeProps) {
  const [chosen, setChosen] = useState(kept.libraryVehicleId ?? library[0]?.id ?? '');
  const [asking, setAsking] = useState(false);
  const entry = library.find(({ id }) => id === chosen);
  if (!entry) return <p className="caption">The library has no vehicle; an administrator fills it.</p>;
  const take = () => {
    setAsking(false);
    onTake(entry);
  };
  return (
    <div className="flex max-w-full min-w-0 flex-wrap items-end gap-3">
      <div className="w-full min-w-0 phone:w-96">
        <Select
          label="From the library"
          choices={library.map(({ id, name }) => ({ value: id, name }))}
          value={chosen}
          onChange={(event) => setChosen(event.target.value)}
        />
      </div>
      <Button
        notYet={entry.id === kept.libraryVehicleId ? 'The study flies this vehicle already.' : undefined}
        onClick={() => (kept.vehicle ? setAsking(true) : take())}
      >
        Take {shortName(entry.name)}
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        onConfirm={take}
        title={`Replace ${shortName(kept.vehicle?.name)}?`}
        confirm={`Take ${shortName(entry.name)}`}
      >
        {kept.libraryVehicleId
          ? 'The study takes the library’s figures as they are now.'
          : 'The figures entered here are replaced by the library’s. The record keeps them.'}
      </ConfirmDialog>
    </div>
  );
}

function originOf(kept: StudyVehicle, library: readonly LibraryVehicle[]): ReactNode {
  if (!kept.vehicle) return 'Losses are entered, to burn-out near the parking altitude.';
  const entry = library.find(({ id }) => id === kept.libraryVehicleId);
  return kept.libraryVehicleId
    ? `Taken from the library${entry ? `: ${entry.name}` : ''}. A change here makes it the study’s own. Losses are entered.`
    : 'Entered in this study. Losses are entered, to burn-out near the parking altitude.';
}

/** The study's vehicle: taken from the library or entered, with a payload check that follows the fields. */
export function VehiclePanel(props: VehicleProps) {
  const { studyId, kept, onKept, library, orbits, turnSpeedFraction, locked } = props;
  const [draft, setDraft] = useState<{ vehicle: VehicleInput | null } | null>(null);
  const [entering, setEntering] = useState(false);
  const [taken, setTaken] = useState(0);
  const autosave = useAutosave<StudyVehicle>({
    kept,
    write: ({ vehicle, libraryVehicleId }, version) =>
      send<StudyVehicle & Saved>('PUT', `/api/v1/studies/${studyId}/vehicle`, {
        ...(libraryVehicleId ? { libraryVehicleId } : { vehicle }),
        version,
      }),
    onKept: (next) => {
      setDraft(null);
      onKept(next);
    },
  });
  const shown = kept.vehicle !== null || entering;
  return (
    <Panel title="Vehicle" caption={originOf(kept, library)}>
      {!locked && (
        <div className="mb-6 flex flex-wrap items-end gap-3">
          <TakeFromLibrary
            library={library}
            kept={kept}
            onTake={({ id, vehicle }) => {
              setTaken(taken + 1);
              setDraft(null);
              autosave.save({ libraryVehicleId: id, vehicle });
            }}
          />
          {!shown && (
            <Button kind="text" onClick={() => setEntering(true)}>
              Enter a vehicle
            </Button>
          )}
        </div>
      )}
      <SaveTrouble
        autosave={autosave}
        what="the vehicle"
        describe={(version) => differencesOf(version, autosave.clash)}
      />
      {shown ? (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-8 sheet:grid-cols-[minmax(0,1fr)_26rem] sheet:gap-14">
          <VehicleForm
            key={`${taken}-${autosave.settled}`}
            vehicle={kept.vehicle}
            locked={locked}
            onChange={(vehicle, basedOn) =>
              autosave.save({ vehicle, libraryVehicleId: null }, { vehicle: basedOn })
            }
            onDraft={(vehicle) => setDraft({ vehicle })}
          />
          <section aria-label="Payload check">
            <h3 className="mb-3 font-medium">Payload check</h3>
            <PayloadCheck
              vehicle={draft ? draft.vehicle : kept.vehicle}
              orbits={orbits}
              turnSpeedFraction={turnSpeedFraction}
            />
          </section>
        </div>
      ) : (
        <EmptyState fact="No vehicle yet.">
          {locked
            ? 'Leads and engineers of the study choose it.'
            : 'Take one from the library, or enter your own. Without one there are Δv figures but no payloads.'}
        </EmptyState>
      )}
    </Panel>
  );
}

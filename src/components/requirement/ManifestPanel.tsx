import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import { Button, EmptyState, Notice, Panel, toast } from '#components/ui/index.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { AddOrbit } from './AddOrbit.tsx';
import { EditOrbit } from './EditOrbit.tsx';
import { ManifestTable } from './ManifestTable.tsx';
import { draftOf } from './orbit-form.ts';
import { nameOfOrbit } from './words.ts';

interface ManifestProps {
  studyId: string;
  orbits: readonly StudyOrbit[];
  /** One orbit as it is now saved. */
  onKept: (orbit: StudyOrbit) => void;
  /** Orbits came, went or moved: read the manifest again. */
  onChanged: () => Promise<unknown>;
  locked: boolean;
}

function freeCode(orbits: readonly StudyOrbit[]): string {
  const taken = new Set(orbits.map(({ code }) => code));
  let n = orbits.length + 1;
  while (taken.has(`O${n}`)) n += 1;
  return `O${n}`;
}

/** Writes that are no field of a form: moving, removing, putting back. */
function useOrbitWrites(studyId: string, onChanged: ManifestProps['onChanged']) {
  const [failure, setFailure] = useState<ApiError | null>(null);
  const address = `/api/v1/studies/${studyId}/orbits`;
  const attempt = async (write: () => Promise<Saved>): Promise<boolean> => {
    setFailure(null);
    let done = true;
    try {
      const { revision, savedAt } = await write();
      announceSaved({ revision, savedAt });
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      done = false;
    }
    await onChanged();
    return done;
  };
  const move = ({ id, version }: StudyOrbit, position: number) =>
    attempt(() => send<Saved>('PATCH', `${address}/${id}`, { position, version }));
  const putBack = (orbit: StudyOrbit) => attempt(() => send<Saved>('POST', address, draftOf(orbit)));
  const remove = async (orbit: StudyOrbit) => {
    const ifMatch = `"${orbit.version}"`;
    const done = await attempt(() => send<Saved>('DELETE', `${address}/${orbit.id}`, undefined, { ifMatch }));
    if (done) toast(`${nameOfOrbit(orbit)} removed from the manifest`, () => void putBack(orbit));
  };
  return { failure, dismiss: () => setFailure(null), move, remove };
}

/** The launch manifest: its table, and the sheets an orbit is written in. */
export function ManifestPanel({ studyId, orbits, onKept, onChanged, locked }: ManifestProps) {
  const [open, setOpen] = useState<string | 'new' | null>(null);
  const { failure, dismiss, move, remove } = useOrbitWrites(studyId, onChanged);
  const editing = orbits.find(({ id }) => id === open);
  const close = () => setOpen(null);
  const add = (
    <Button icon="add" onClick={() => setOpen('new')}>
      Add target orbit
    </Button>
  );
  return (
    <Panel
      title="Launch manifest"
      caption="Target orbits with their flights a year. Altitudes are over the equatorial radius, 6,378.137 km."
    >
      {failure && (
        <div className="mb-4">
          <Notice
            fact={failure.message}
            requestId={failure.requestId}
            actions={<Button onClick={dismiss}>Close this</Button>}
          >
            The manifest below is how it is now.
          </Notice>
        </div>
      )}
      <ManifestTable
        orbits={orbits}
        locked={locked}
        onEdit={({ id }) => setOpen(id)}
        onMove={(orbit, position) => void move(orbit, position)}
        onRemove={(orbit) => void remove(orbit)}
      />
      {orbits.length === 0 ? (
        <div className="mt-4">
          <EmptyState fact="No target orbits yet." actions={!locked && add}>
            {locked
              ? 'Leads and engineers of the study write the manifest.'
              : 'Add the orbits this site is to fly to, with the flights a year of each.'}
          </EmptyState>
        </div>
      ) : (
        !locked && <div className="mt-4">{add}</div>
      )}
      {open === 'new' && (
        <AddOrbit
          studyId={studyId}
          code={freeCode(orbits)}
          onClose={close}
          onAdded={(orbit) => {
            close();
            onKept(orbit);
            void onChanged();
          }}
        />
      )}
      {editing && (
        <EditOrbit key={editing.id} studyId={studyId} orbit={editing} onKept={onKept} onClose={close} />
      )}
    </Panel>
  );
}

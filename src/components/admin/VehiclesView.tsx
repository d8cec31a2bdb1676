import { useState, type ReactNode } from 'react';
import type { LibraryVehicle, LibraryVehicleList } from '#contract/requirement.ts';
import { send } from '#components/live/api.ts';
import { useAction, useApi, useFinding } from '#components/live/hooks.ts';
import { Pager } from '#components/studies/Pager.tsx';
import { Button, ConfirmDialog, EmptyState, Finding, Notice, toast } from '#components/ui/index.ts';
import { VehicleEditor } from './VehicleEditor.tsx';
import { VehicleTable } from './VehicleTable.tsx';
import { libraryFinding } from './words.ts';

const ADDRESS = '/api/v1/admin/vehicles';
const PAGE_SIZE = 50;

/** The shared library: what studies choose from. Studies hold copies, so a change here moves none of them. */
export function VehiclesView({ list, children }: { list: LibraryVehicleList; children: ReactNode }) {
  const [page, setPage] = useState(1);
  const [editing, setEditing] = useState<{ vehicle: LibraryVehicle | null } | null>(null);
  const [archiving, setArchiving] = useState<LibraryVehicle | null>(null);
  const { busy, error, run } = useAction();
  const { data = list, mutate } = useApi<LibraryVehicleList>(
    `${ADDRESS}?page=${page}&pageSize=${PAGE_SIZE}`,
    {
      ...(page === 1 ? { fallbackData: list } : {}),
      revalidateOnMount: page !== 1,
    },
  );
  const archive = async ({ id, name, version }: LibraryVehicle, archived: boolean) => {
    await run(async () => {
      await send('PATCH', `${ADDRESS}/${id}`, { archived, version });
      toast(archived ? `${name} is archived` : `${name} can be chosen again`);
    });
    setArchiving(null);
    await mutate();
  };
  const saved = (vehicle: LibraryVehicle) => {
    setEditing(null);
    toast(`${vehicle.name} is in the library`);
    void mutate();
  };
  const finding = libraryFinding(data);
  useFinding(finding);
  if (editing)
    return (
      <>
        <Finding>{finding}</Finding>
        {children}
        <VehicleEditor entry={editing.vehicle} onSaved={saved} onLeave={() => setEditing(null)} />
      </>
    );
  return (
    <>
      <Finding
        actions={
          <Button kind="primary" icon="add" onClick={() => setEditing({ vehicle: null })}>
            Add a vehicle
          </Button>
        }
      >
        {finding}
      </Finding>
      {children}
      {error && (
        <div className="mb-4">
          <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
            The library below is how it is now.
          </Notice>
        </div>
      )}
      <VehicleTable
        vehicles={data.items}
        onEdit={(vehicle) => setEditing({ vehicle })}
        onArchive={(vehicle) => (vehicle.archived ? void archive(vehicle, false) : setArchiving(vehicle))}
      />
      {data.items.length === 0 && (
        <div className="mt-3">
          <EmptyState fact="No vehicle yet">Add one; studies choose from here or enter their own.</EmptyState>
        </div>
      )}
      <Pager what="vehicles" page={page} pageSize={PAGE_SIZE} total={data.total} onPage={setPage} />
      <ConfirmDialog
        open={archiving !== null}
        onClose={() => setArchiving(null)}
        onConfirm={() => archiving && void archive(archiving, true)}
        busy={busy}
        title={`Archive ${archiving?.name ?? ''}?`}
        confirm="Archive vehicle"
      >
        It can no longer be chosen. Studies that fly it keep their copy, and you can restore it.
      </ConfirmDialog>
    </>
  );
}

import type { LibraryVehicleInput, LibraryVehiclePatch } from '#contract/admin.ts';
import type { ListQuery } from '#contract/list.ts';
import type { LibraryVehicle, LibraryVehicleList } from '#contract/requirement.ts';
import type { Db, PooledDb } from '#db/client.ts';
import {
  findLibraryVehicle,
  findLibraryVehicleByCode,
  insertLibraryVehicle,
  listLibraryVehicles,
  lockLibraryVehicle,
  updateLibraryVehicle,
} from '#db/queries/vehicle.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import { writeRecord, type RecordEntry } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';
import { presentLibraryVehicle } from '#server/requirement/present.ts';

/** The whole library, archived vehicles included. */
export async function readLibrary(db: Db, query: ListQuery): Promise<LibraryVehicleList> {
  const { rows, total } = await listLibraryVehicles(db, { ...query, archived: true });
  return { items: rows.map(presentLibraryVehicle), total };
}

export async function readVehicle(db: Db, vehicleId: string): Promise<LibraryVehicle> {
  const row = await findLibraryVehicle(db, { vehicleId });
  if (!row) throw notFound('There is no such vehicle in the library.');
  return presentLibraryVehicle(row);
}

async function refuseTaken(tx: Db, code: string, except?: string): Promise<void> {
  const holder = await findLibraryVehicleByCode(tx, { code });
  if (!holder || holder.id === except) return;
  throw new AppError('invalid', 'Some of the input does not fit. Nothing was saved.', {
    errors: [
      { path: 'code', message: `Code ${code} is taken by ${holder.name}. Give this vehicle another.` },
    ],
  });
}

const note = (tx: Db, actor: SignedIn, entry: RecordEntry): Promise<void> =>
  writeRecord(tx, { studyId: null, userId: actor.userId, revision: null }, [entry]);

/** Adds a vehicle. @throws AppError 'invalid' where the code is taken */
export async function addVehicle(
  db: PooledDb,
  actor: SignedIn,
  { code, vehicle }: LibraryVehicleInput,
): Promise<LibraryVehicle> {
  return db.transaction(async (tx) => {
    await refuseTaken(tx, code);
    const spec = { ...vehicle, code };
    const row = await insertLibraryVehicle(tx, { code, name: vehicle.name ?? code, spec });
    await note(tx, actor, { object: 'library-vehicle', objectId: row.id, action: 'add', to: spec });
    return presentLibraryVehicle(row);
  });
}

interface VehicleChange {
  vehicleId: string;
  version: number;
  patch: LibraryVehiclePatch;
}

/**
 * Edits, archives or restores a vehicle. Studies hold copies: none of them moves.
 * @throws AppError 'not-found' · 'stale' · 'invalid'
 */
export async function changeVehicle(
  db: PooledDb,
  actor: SignedIn,
  { vehicleId, version, patch }: VehicleChange,
): Promise<LibraryVehicle> {
  return db.transaction(async (tx) => {
    const row = await lockLibraryVehicle(tx, { vehicleId });
    if (!row) throw notFound('There is no such vehicle in the library.');
    if (row.version !== version) throw stale(presentLibraryVehicle(row));
    const code = patch.code ?? row.code;
    await refuseTaken(tx, code, row.id);
    const spec = { ...(patch.vehicle ?? row.spec), code };
    const archivedAt = patch.archived === undefined ? row.archivedAt : patch.archived ? new Date() : null;
    const values = { code, name: patch.vehicle?.name ?? row.name, spec, archivedAt };
    const after = (await updateLibraryVehicle(tx, { vehicleId, values })) ?? row;
    const state = (of: typeof row) => ({ ...of.spec, archived: of.archivedAt !== null });
    await note(tx, actor, {
      object: 'library-vehicle',
      objectId: vehicleId,
      action: 'change',
      from: state(row),
      to: state(after),
    });
    return presentLibraryVehicle(after);
  });
}

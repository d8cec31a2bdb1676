import { useEffect, useState } from 'react';
import { LibraryVehicleInput } from '#contract/admin.ts';
import type { LibraryVehicle } from '#contract/requirement.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { send, type ApiError } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, ConfirmDialog, Conflict, Notice, Panel, TextField } from '#components/ui/index.ts';
import { VehicleForm } from '#components/vehicle/VehicleForm.tsx';
import { at } from './words.ts';

const ADDRESS = '/api/v1/admin/vehicles';

interface EditorProps {
  /** Null for a new one. */
  entry: LibraryVehicle | null;
  onSaved: (entry: LibraryVehicle) => void;
  onLeave: () => void;
}

/** The reason a code is refused: its shape, or that another vehicle has it. */
function codeError(code: string, error: ApiError | null): string | undefined {
  const shape = LibraryVehicleInput.shape.code.safeParse(code);
  if (code !== '' && !shape.success) return shape.error.issues[0]?.message;
  return error?.errors.find(({ path }) => path === 'code')?.message;
}

function notReady(code: string, vehicle: VehicleInput | null): string | undefined {
  if (!LibraryVehicleInput.shape.code.safeParse(code).success) return 'Give the vehicle a code first.';
  if (!vehicle) return 'Some figures are missing or do not fit yet.';
  return vehicle.name ? undefined : 'Give the vehicle a name first.';
}

/** The browser asks before a page with unsaved changes is left. */
function useUnloadGuard(changed: boolean) {
  useEffect(() => {
    if (!changed) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener('beforeunload', ask);
    return () => removeEventListener('beforeunload', ask);
  }, [changed]);
}

/** Adding or editing a vehicle of the library; unlike a study's, it is saved by a button. */
export function VehicleEditor({ entry, onSaved, onLeave }: EditorProps) {
  const [base, setBase] = useState(entry);
  const [code, setCode] = useState(entry?.code ?? '');
  const [left, setLeft] = useState(false);
  const [leaving, setLeaving] = useState(false);
  const [draft, setDraft] = useState<VehicleInput | null>(entry?.vehicle ?? null);
  const { busy, error, run } = useAction();
  const save = (version: number | undefined) =>
    run(async () => {
      const body = { code, vehicle: draft };
      const saved = base
        ? await send<LibraryVehicle>('PATCH', `${ADDRESS}/${base.id}`, { ...body, version })
        : await send<LibraryVehicle>('POST', ADDRESS, body);
      onSaved(saved);
    });
  const changed =
    code !== (base?.code ?? '') || JSON.stringify(draft) !== JSON.stringify(base?.vehicle ?? null);
  useUnloadGuard(changed && !busy);
  const theirs = error?.code === 'stale' ? (error.current as LibraryVehicle) : null;
  const takeTheirs = (kept: LibraryVehicle) => {
    setBase(kept);
    onSaved(kept);
  };
  return (
    <Panel
      title={entry ? entry.name : 'A new vehicle'}
      caption="Studies that fly a vehicle hold a copy: what you change here reaches those that choose it from now on."
    >
      <div className="mb-6 max-w-[16rem]">
        <TextField
          label="Code"
          autoComplete="off"
          hint="2 to 12 capital letters, digits or hyphens"
          value={code}
          error={left ? codeError(code, error) : undefined}
          onChange={(event) => setCode(event.target.value.toUpperCase())}
          onBlur={() => setLeft(true)}
        />
      </div>
      <VehicleForm vehicle={base?.vehicle ?? null} locked={false} onChange={setDraft} onDraft={setDraft} />
      {theirs && (
        <div className="mt-6">
          <Conflict
            what={theirs.name}
            at={theirs.updatedAt}
            yours={`${draft?.name ?? ''}, your figures`}
            theirs={`${theirs.name}, changed ${at(theirs.updatedAt)} UTC`}
            keepTheirs="Keep theirs"
            putYours="Put yours"
            onKeepTheirs={() => takeTheirs(theirs)}
            onPutYours={() => void save(theirs.version)}
          />
        </div>
      )}
      {error && !theirs && (
        <div className="mt-6">
          <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
            {error.errors.map(({ message }) => message).join(' ') || 'What you typed is still here.'}
          </Notice>
        </div>
      )}
      <div className="mt-6 flex gap-3">
        <Button
          kind="primary"
          busy={busy}
          notYet={notReady(code, draft)}
          onClick={() => void save(base?.version)}
        >
          Save vehicle
        </Button>
        <Button kind="text" onClick={() => (changed ? setLeaving(true) : onLeave())}>
          Leave without saving
        </Button>
      </div>
      <ConfirmDialog
        open={leaving}
        onClose={() => setLeaving(false)}
        onConfirm={onLeave}
        destructive
        title="Leave without saving?"
        confirm="Leave without saving"
      >
        What you changed of {entry?.name ?? 'the new vehicle'} is lost.
      </ConfirmDialog>
    </Panel>
  );
}

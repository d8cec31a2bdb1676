import { useCallback, useEffect, useRef, useState } from 'react';
import { useForm, useWatch, type FieldPath, type UseFormReturn } from 'react-hook-form';
import { Select, TextField } from '#components/ui/index.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { BoosterFields } from './BoosterFields.tsx';
import { fieldsOf, readVehicle, type VehicleFields } from './fields.ts';
import { Figure } from './Figure.tsx';
import { LossFields } from './LossFields.tsx';
import { StageTable } from './StageTable.tsx';

interface VehicleFormProps {
  /** The vehicle as it is saved; null where there is none yet. */
  vehicle: VehicleInput | null;
  locked: boolean;
  /** A whole vehicle that differs from the saved one, when a field is left, and the saved one it was edited from. */
  onChange: (vehicle: VehicleInput, basedOn: VehicleInput | null) => void;
  /** The vehicle as it stands in the fields, whole or not: for what is computed live beside the form. */
  onDraft?: ((vehicle: VehicleInput | null) => void) | undefined;
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** Puts what the schema refuses beside its fields: those left so far, or all. */
function showErrors(
  form: UseFormReturn<VehicleFields>,
  issues: readonly { path: PropertyKey[]; message: string }[],
  reached: ReadonlySet<string> | null,
): void {
  form.clearErrors();
  for (const { path, message } of issues) {
    const field = path[0] === 'boosters' && path.length === 1 ? 'boosters.count' : path.join('.');
    if (!reached || reached.has(field)) form.setError(field as FieldPath<VehicleFields>, { message });
  }
}

/**
 * Takes in a vehicle that was saved elsewhere, unless one is being written here.
 * @returns the saved vehicle that what stands in the fields is based on
 */
function useSavedVehicle(
  form: UseFormReturn<VehicleFields>,
  vehicle: VehicleInput | null,
): () => VehicleInput | null {
  const basedOn = useRef(vehicle);
  useEffect(() => {
    if (same(basedOn.current, vehicle)) return;
    const read = readVehicle(form.getValues(), basedOn.current);
    const caughtUp = read.success && same(read.data, vehicle);
    const untouched = same(form.getValues(), fieldsOf(basedOn.current));
    if (!caughtUp && !untouched) return;
    basedOn.current = vehicle;
    if (!caughtUp) form.reset(fieldsOf(vehicle));
  }, [form, vehicle]);
  return useCallback(() => basedOn.current, []);
}

/** Stages, boosters, fairing, losses and reserve of a vehicle; checked on leaving a field, by the interface's schema. */
export function VehicleForm({ vehicle, locked, onChange, onDraft }: VehicleFormProps) {
  const form = useForm<VehicleFields>({ defaultValues: fieldsOf(vehicle) });
  const [reached, setReached] = useState<ReadonlySet<string>>(new Set());
  const [waits, setWaits] = useState(false);
  const basedOn = useSavedVehicle(form, vehicle);
  const leave = (field?: FieldPath<VehicleFields>) => {
    if (locked) return;
    const left = field ? new Set([...reached, field]) : reached;
    setReached(left);
    const read = readVehicle(form.getValues(), vehicle);
    showErrors(form, read.error?.issues ?? [], vehicle ? null : left);
    setWaits(!read.success);
    onDraft?.(read.success ? read.data : null);
    if (read.success && !same(read.data, vehicle)) onChange(read.data, basedOn());
  };
  const parts = { form, locked, onLeave: leave };
  const stages = useWatch({ control: form.control, name: 'stages' }).length;
  return (
    <form
      className="grid grid-cols-[minmax(0,1fr)] content-start gap-6"
      noValidate
      onSubmit={(event) => event.preventDefault()}
    >
      <div className="max-w-md">
        <TextField
          label="Name"
          readOnly={locked}
          maxLength={120}
          error={form.formState.errors.name}
          {...form.register('name', { onBlur: () => leave('name') })}
        />
      </div>
      <div>
        <StageTable {...parts} />
      </div>
      <BoosterFields {...parts} />
      <div className="grid gap-4 phone:grid-cols-3">
        <Figure {...parts} name="fairingKg" label="Fairing" unit="kg" hint="Default 0" />
        <Select
          label="The fairing leaves"
          disabled={locked}
          choices={Array.from({ length: stages }, (_, i) => ({
            value: String(i + 1),
            name: `after the burn of stage ${i + 1}`,
          }))}
          error={form.formState.errors.fairingLeavesAfterStage}
          {...form.register('fairingLeavesAfterStage', { setValueAs: Number, onChange: () => leave() })}
        />
        <Figure
          {...parts}
          name="reserveMps"
          label="Reserve"
          unit="m/s"
          hint="Kept unflown at the end; default 0"
        />
      </div>
      <LossFields {...parts} />
      {waits && (
        <p className="text-sm text-ink-2" role="status">
          Not every field fits yet. Until it does, nothing of this is saved.
        </p>
      )}
    </form>
  );
}

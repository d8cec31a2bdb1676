import type { FieldPath, UseFormReturn } from 'react-hook-form';
import { asTypedNumber, NumberField } from '#components/ui/index.ts';
import type { VehicleFields } from './fields.ts';

export interface VehicleFormParts {
  form: UseFormReturn<VehicleFields>;
  locked: boolean;
  /** Called when a field is left, or something without a field of its own has changed. */
  onLeave: (field?: FieldPath<VehicleFields>) => void;
}

interface FigureProps extends VehicleFormParts {
  name: FieldPath<VehicleFields>;
  label: string;
  unit?: string;
  hint?: string | undefined;
  reading?: string | undefined;
  optional?: boolean;
  labelHidden?: boolean;
}

/** One figure of a vehicle, with its unit in the field and its reason under it. */
export function Figure({ form, locked, onLeave, name, ...looks }: FigureProps) {
  return (
    <NumberField
      {...looks}
      error={form.getFieldState(name, form.formState).error}
      readOnly={locked}
      {...form.register(name, {
        ...asTypedNumber,
        onBlur: () => onLeave(name),
        onChange: () => form.clearErrors(name),
      })}
    />
  );
}

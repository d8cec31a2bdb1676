import { Controller, useWatch, type UseFormReturn } from 'react-hook-form';
import { asTypedNumber, NumberField, Select, Switch, TextField } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import { DEFAULT_PARKING_KM } from '#contract/orbit.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { ORBIT_LABELS, type OrbitFields } from './orbit-form.ts';
import { PROFILE_NAMES, sunSynchronousDeg } from './words.ts';

const PROFILES = (Object.keys(PROFILE_NAMES) as StudyOrbit['profile'][]).map((value) => ({
  value,
  name: PROFILE_NAMES[value],
}));

interface FieldsetProps {
  form: UseFormReturn<OrbitFields>;
  /** Called when a field is left. */
  onLeave: (field: keyof OrbitFields) => void;
}

type NumberName = 'perigeeKm' | 'apogeeKm' | 'inclinationDeg' | 'parkingKm' | 'flightsPerYear';

/** The fields of one target orbit, in its own units, each with its reason beside it. */
export function OrbitFieldset({ form, onLeave }: FieldsetProps) {
  const { errors } = form.formState;
  const [perigeeKm, apogeeKm, sunSynchronous] = useWatch({
    control: form.control,
    name: ['perigeeKm', 'apogeeKm', 'sunSynchronous'],
  });
  // A complaint is withdrawn at the first change, so that nothing moves under the pointer when the field is left.
  const withdraw = (name: keyof OrbitFields) => form.clearErrors(name);
  const text = (name: 'name' | 'code') => ({
    label: ORBIT_LABELS[name],
    error: errors[name],
    ...form.register(name, { onBlur: () => onLeave(name), onChange: () => withdraw(name) }),
  });
  const figure = (name: NumberName, unit?: string) => ({
    label: ORBIT_LABELS[name],
    unit,
    error: errors[name],
    ...form.register(name, {
      ...asTypedNumber,
      onBlur: () => onLeave(name),
      onChange: () => withdraw(name),
    }),
  });
  const found = sunSynchronousDeg(perigeeKm, apogeeKm);
  return (
    <div className="grid gap-4">
      <div className="grid grid-cols-[1fr_7rem] gap-4">
        <TextField {...text('name')} optional hint="As it is spoken of" />
        <TextField {...text('code')} hint="In exports" />
      </div>
      <div className="grid grid-cols-2 gap-4">
        <NumberField {...figure('perigeeKm', 'km')} hint="Over the equatorial radius, 6,378.137 km" />
        <NumberField {...figure('apogeeKm', 'km')} hint="The same as the perigee for a circle" />
      </div>
      <Controller
        control={form.control}
        name="sunSynchronous"
        render={({ field }) => (
          <Switch
            label="Sun-synchronous"
            hint="The inclination follows from the altitudes"
            checked={field.value}
            onChange={(event) => {
              field.onChange(event.target.checked);
              form.clearErrors(['inclinationDeg', 'sunSynchronous']);
              onLeave('sunSynchronous');
            }}
          />
        )}
      />
      {sunSynchronous ? (
        <p className="fld-reading" role="status">
          {found === null
            ? 'Give both altitudes: the inclination that follows stands here, or that there is none.'
            : `Inclination ${formatNumber(found, 2)}°, so that the orbit’s plane turns once a year with the Sun.`}
          {errors.sunSynchronous?.message && ` ${errors.sunSynchronous.message}`}
        </p>
      ) : (
        <NumberField
          {...figure('inclinationDeg', '°')}
          hint="To the equator, 0 to 180; above 90 is retrograde"
        />
      )}
      <Select
        label={ORBIT_LABELS.profile}
        choices={PROFILES}
        error={errors.profile}
        hint="Direct is allowed where the perigee is no higher than the parking altitude"
        {...form.register('profile', { onChange: () => onLeave('profile') })}
      />
      <div className="grid grid-cols-2 gap-4">
        <NumberField
          {...figure('parkingKm', 'km')}
          hint={`Default ${DEFAULT_PARKING_KM}: entered losses belong to a burn-out near it`}
        />
        <NumberField {...figure('flightsPerYear')} hint="0 counts for no payload a year" />
      </div>
    </div>
  );
}

import { useEffect, useImperativeHandle, useMemo, useRef, type Ref } from 'react';
import { useForm, useWatch, type Path } from 'react-hook-form';
import { ApiError } from '#components/live/api.ts';
import { Button } from '#components/ui/Button.tsx';
import { NumberField, TextField } from '#components/ui/Field.tsx';
import { showServerErrors } from '#components/ui/form.ts';
import { formatFull, formatNumber } from '#contract/format.ts';
import type { Site, SiteDraft } from '#contract/site.ts';
import { NearIndex } from '#core/csv/near.ts';
import { azimuthsOf, elevationOf, latitudeOf, longitudeOf, readCell, type Reading } from './read-site.ts';

/** As typed. */
interface Typed {
  name: string;
  code: string;
  latitudeDeg: string;
  longitudeDeg: string;
  elevationM: string;
  permittedAzimuthsDeg: string;
}
const empty: Typed = {
  name: '',
  code: '',
  latitudeDeg: '',
  longitudeDeg: '',
  elevationM: '',
  permittedAzimuthsDeg: '',
};

export interface AddSiteHandle {
  /** Fills in a place that was taken from the map and asks for the name. */
  take: (longitudeDeg: number, latitudeDeg: number) => void;
  focus: () => void;
}

interface AddSiteProps {
  sites: readonly Site[];
  locked: string | null;
  placing: boolean;
  onPlacing: (placing: boolean) => void;
  onAdd: (draft: SiteDraft) => Promise<Site>;
  ref: Ref<AddSiteHandle>;
}

const refusalOf = (reading: Reading<unknown>): string | true =>
  reading.kind === 'read' ||
  (reading.meant ? `${reading.message} Did you mean ${reading.meant}?` : reading.message);

const wordsOf = (reading: Reading<unknown>, text: string): string | undefined =>
  text.trim() !== '' && reading.kind === 'read' ? reading.words : undefined;

/** A latitude that can only be a longitude, beside a longitude that can be a latitude. */
function looksExchanged({ latitudeDeg, longitudeDeg }: Typed): boolean {
  if (latitudeDeg.trim() === '' || longitudeDeg.trim() === '') return false;
  const asTyped = latitudeOf(latitudeDeg).kind === 'read' && longitudeOf(longitudeDeg).kind === 'read';
  return !asTyped && latitudeOf(longitudeDeg).kind === 'read' && longitudeOf(latitudeDeg).kind === 'read';
}

/** A warning, not a refusal: another site within a kilometre. */
function nearWords(index: NearIndex<Site>, { latitudeDeg, longitudeDeg }: Typed): string | undefined {
  const [latitude, longitude] = [latitudeOf(latitudeDeg), longitudeOf(longitudeDeg)];
  if (latitude.kind !== 'read' || longitude.kind !== 'read') return undefined;
  const near = index.find({ latitudeDeg: latitude.value, longitudeDeg: longitude.value }, () => true);
  return near && `${formatNumber(near.distanceKm, 2)} km from ${near.place.name}. It can still be added.`;
}

function indexOf(sites: readonly Site[]): NearIndex<Site> {
  const index = new NearIndex<Site>();
  for (const site of sites) index.add(site);
  return index;
}

function draftOf(typed: Typed): SiteDraft | undefined {
  const latitude = latitudeOf(typed.latitudeDeg);
  const longitude = longitudeOf(typed.longitudeDeg);
  const elevation = elevationOf(typed.elevationM);
  const azimuths = azimuthsOf(typed.permittedAzimuthsDeg);
  if (latitude.kind !== 'read' || longitude.kind !== 'read') return undefined;
  if (elevation.kind !== 'read' || azimuths.kind !== 'read') return undefined;
  return {
    name: typed.name,
    ...(typed.code.trim() === '' ? {} : { code: typed.code }),
    latitudeDeg: latitude.value,
    longitudeDeg: longitude.value,
    elevationM: elevation.value,
    permittedAzimuthsDeg: azimuths.value,
  };
}

/** A new candidate by typing: decimal degrees or degrees, minutes and seconds; what was read stands beneath. */
export function AddSite({ sites, locked, placing, onPlacing, onAdd, ref }: AddSiteProps) {
  const form = useForm<Typed>({ defaultValues: empty, mode: 'onBlur', reValidateMode: 'onBlur' });
  const { register, formState, setError, setValue, setFocus } = form;
  const typed = useWatch({ control: form.control }) as Typed;
  const heading = useRef<HTMLHeadingElement>(null);
  useImperativeHandle(ref, () => ({
    take: (longitudeDeg, latitudeDeg) => {
      setValue('latitudeDeg', formatFull(latitudeDeg), { shouldValidate: true });
      setValue('longitudeDeg', formatFull(longitudeDeg), { shouldValidate: true });
      setFocus('name');
    },
    focus: () => {
      heading.current?.scrollIntoView({ block: 'center' });
      setFocus('name');
    },
  }));
  useEffect(() => {
    if (!placing) return;
    const stop = (event: KeyboardEvent) => {
      if (event.key === 'Escape') onPlacing(false);
    };
    document.addEventListener('keydown', stop);
    return () => document.removeEventListener('keydown', stop);
  }, [placing, onPlacing]);

  const submit = form.handleSubmit(async (values) => {
    const draft = draftOf(values);
    if (!draft) return;
    try {
      await onAdd(draft);
      form.reset(empty);
      setFocus('name');
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      const placed = showServerErrors<Typed>(error, Object.keys(empty) as Path<Typed>[], setError);
      if (!placed) setError('root', { message: error.message });
    }
  });
  const exchange = () => {
    setValue('latitudeDeg', typed.longitudeDeg, { shouldValidate: true });
    setValue('longitudeDeg', typed.latitudeDeg, { shouldValidate: true });
  };
  const check = (read: (text: string) => Reading<unknown>) => ({
    validate: (text: string) => refusalOf(read(text)),
  });
  const { errors, isSubmitting } = formState;
  const index = useMemo(() => indexOf(sites), [sites]);
  const near = nearWords(index, typed);

  return (
    <form className="add-site" onSubmit={(event) => void submit(event)} noValidate>
      <h2 ref={heading}>Add by typing</h2>
      <div className="add-site-fields">
        <TextField
          label="Name"
          error={errors.name}
          {...register(
            'name',
            check((text) => readCell('name', text)),
          )}
        />
        <NumberField
          label="Latitude"
          unit="°"
          reading={wordsOf(latitudeOf(typed.latitudeDeg), typed.latitudeDeg)}
          error={errors.latitudeDeg}
          {...register('latitudeDeg', check(latitudeOf))}
        />
        <NumberField
          label="Longitude"
          unit="°"
          reading={wordsOf(longitudeOf(typed.longitudeDeg), typed.longitudeDeg)}
          error={errors.longitudeDeg}
          {...register('longitudeDeg', check(longitudeOf))}
        />
        <TextField
          label="Code"
          optional
          hint="made from the name when empty"
          error={errors.code}
          {...register(
            'code',
            check((text) =>
              text.trim() === '' ? { kind: 'read', value: '', words: '' } : readCell('code', text),
            ),
          )}
        />
        <NumberField
          label="Elevation"
          optional
          unit="m"
          error={errors.elevationM}
          {...register('elevationM', check(elevationOf))}
        />
        <TextField
          label="Permitted azimuths"
          optional
          unit="°"
          className="num"
          hint="35-120; 200-250, clockwise; empty is all round"
          error={errors.permittedAzimuthsDeg}
          {...register('permittedAzimuthsDeg', check(azimuthsOf))}
        />
      </div>
      {looksExchanged(typed) && (
        <p className="add-site-note">
          Latitude and longitude look swapped.{' '}
          <Button size="small" onClick={exchange}>
            Swap them
          </Button>
        </p>
      )}
      {near && <p className="add-site-note">{near}</p>}
      {errors.root && (
        <p className="fld-error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="add-site-acts">
        <Button type="submit" icon="add" busy={isSubmitting} notYet={locked ?? undefined}>
          Add site
        </Button>
        <Button
          kind="text"
          icon="place"
          aria-pressed={placing}
          notYet={locked ?? undefined}
          onClick={() => onPlacing(!placing)}
        >
          {placing ? 'Leave the map as it is' : 'Take a place from the map'}
        </Button>
      </div>
    </form>
  );
}

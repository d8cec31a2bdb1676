import type { Criterion } from '#contract/criterion.ts';
import { QUANTITIES } from '#contract/quantity.ts';

interface ComputedFromProps {
  studyId: string;
  criterion: Criterion;
  computed?: string | undefined;
}

/** What a computed figure follows from, and where that is changed: it takes no entry of its own. */
export function ComputedFrom({ studyId, criterion, computed }: ComputedFromProps) {
  const quantity = criterion.quantity === null ? undefined : QUANTITIES[criterion.quantity];
  const section = (name: string): string => `/studies/${studyId}/${name}`;
  return (
    <div className="fig-computed">
      {computed !== undefined && <p className="fig-computed-figure num">{computed}</p>}
      <p>
        <b>Computed; it takes no entry.</b> {quantity === undefined ? criterion.name : quantity.name} follows
        from the site’s position and azimuths, the orbits and the vehicle
        {criterion.orbitId === null && quantity?.overManifest ? `: ${quantity.overManifest}` : ''}
        {criterion.orbitId === null ? '.' : ', for one orbit of the manifest.'}
      </p>
      <p>
        Change what it follows from: <a href={section('requirement')}>orbits and vehicle</a>,{' '}
        <a href={section('sites')}>the site</a>. See it line by line under{' '}
        <a href={section('flight')}>Flight</a>.
      </p>
    </div>
  );
}

import { Button, IconButton, Tag } from '#components/ui/index.ts';
import { formatFull } from '#contract/format.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { inclinationInWords, nameOfOrbit, PROFILE_NAMES } from './words.ts';

export interface OrbitActions {
  onEdit: (orbit: StudyOrbit) => void;
  onMove: (orbit: StudyOrbit, position: number) => void;
  onRemove: (orbit: StudyOrbit) => void;
}

interface TableProps extends OrbitActions {
  orbits: readonly StudyOrbit[];
  /** Read only: the reason stands above the table. */
  locked: boolean;
}

function OrbitButtons({ orbit, last, ...actions }: { orbit: StudyOrbit; last: number } & OrbitActions) {
  const name = nameOfOrbit(orbit);
  return (
    <span className="flex items-center justify-end gap-1 whitespace-nowrap">
      <IconButton
        icon="up"
        label={`Move ${name} up`}
        disabled={orbit.position === 0}
        onClick={() => actions.onMove(orbit, orbit.position - 1)}
      />
      <IconButton
        icon="down"
        label={`Move ${name} down`}
        disabled={orbit.position === last}
        onClick={() => actions.onMove(orbit, orbit.position + 1)}
      />
      <Button size="small" icon="edit" aria-label={`Edit ${name}`} onClick={() => actions.onEdit(orbit)}>
        Edit
      </Button>
      <Button
        size="small"
        icon="remove"
        aria-label={`Remove ${name}`}
        onClick={() => actions.onRemove(orbit)}
      >
        Remove
      </Button>
    </span>
  );
}

function OrbitRow({ orbit }: { orbit: StudyOrbit }) {
  return (
    <>
      <th scope="row">
        <span className="name">{nameOfOrbit(orbit)}</span>
        <span className="sub num">{orbit.code}</span>
      </th>
      <td className="num">{formatFull(orbit.perigeeKm)}</td>
      <td className="num">{formatFull(orbit.apogeeKm)}</td>
      <td className="num">
        {inclinationInWords(orbit)}
        {orbit.sunSynchronous && (
          <span className="sub font-sans">
            <Tag>sun-synchronous</Tag>
          </span>
        )}
      </td>
      <td className="pl-6 whitespace-nowrap">{PROFILE_NAMES[orbit.profile]}</td>
      <td className="num">{formatFull(orbit.parkingKm)}</td>
      <td className="num">{formatFull(orbit.flightsPerYear)}</td>
    </>
  );
}

const HEADINGS = [
  { name: 'Perigee', unit: 'km' },
  { name: 'Apogee', unit: 'km' },
  { name: 'Inclination', unit: '°' },
  { name: 'Profile', unit: null },
  { name: 'Parking orbit', unit: 'km' },
  { name: 'Flights', unit: 'a year' },
] as const;

/** The launch manifest, in its order. */
export function ManifestTable({ orbits, locked, ...actions }: TableProps) {
  const flights = orbits.reduce((sum, { flightsPerYear }) => sum + flightsPerYear, 0);
  return (
    <div className="table-scroll" role="region" aria-label="Launch manifest" tabIndex={0}>
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Target orbit</th>
            {HEADINGS.map(({ name, unit }) => (
              <th key={name} scope="col" className={unit === null ? 'pl-6' : 'num'}>
                {name} {unit && <span className="unit">{unit}</span>}
              </th>
            ))}
            {!locked && (
              <th scope="col">
                <span className="sr-only">Actions</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {orbits.map((orbit) => (
            <tr key={orbit.id}>
              <OrbitRow orbit={orbit} />
              {!locked && (
                <td>
                  <OrbitButtons orbit={orbit} last={orbits.length - 1} {...actions} />
                </td>
              )}
            </tr>
          ))}
          {orbits.length > 1 && (
            <tr className="band">
              <th scope="row" colSpan={6}>
                Whole manifest
              </th>
              <td className="num">{formatFull(flights)}</td>
              {!locked && <td />}
            </tr>
          )}
        </tbody>
      </table>
    </div>
  );
}

import { useMemo, useState } from 'react';
import { NumberField } from '#components/ui/index.ts';
import type { OrbitResult } from '#contract/evaluate.ts';
import { formatNumber, readTypedNumber } from '#contract/format.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { carriedFor, flightsFromEquator, type Carried } from './payload-check.ts';
import { nameOfOrbit } from './words.ts';

interface CheckProps {
  /** Null while the form does not hold a whole vehicle. */
  vehicle: VehicleInput | null;
  orbits: readonly StudyOrbit[];
  turnSpeedFraction: number;
}

const MOST_DELTA_V_MPS = 50_000;

/** Decimals on hover: payloads are solved to a hundredth; the last bits differ between browser and server. */
const FULL = 2;

function Payload({ carried }: { carried: Carried | null }) {
  if (!carried) return <>–</>;
  return 'payloadKg' in carried ? (
    <span title={`${formatNumber(carried.payloadKg, FULL)} kg`}>{formatNumber(carried.payloadKg)}</span>
  ) : (
    <span className="font-sans">falls short by {formatNumber(carried.shortfallMps)} m/s</span>
  );
}

function carriedOf(result: OrbitResult): Carried | null {
  if (result.payloadKg !== null) return { payloadKg: result.payloadKg };
  return result.shortfallMps === null ? null : { shortfallMps: result.shortfallMps };
}

function OrbitRow({ name, result }: { name: string; result: OrbitResult }) {
  return (
    <tr>
      <th scope="row">{name}</th>
      {result.way === 'out-of-reach' ? (
        <td colSpan={2} className="num">
          <span className="font-sans">out of reach</span>
        </td>
      ) : (
        <>
          <td className="num" title={`${formatNumber(result.deltaVMps.total, FULL)} m/s`}>
            {formatNumber(result.deltaVMps.total)}
          </td>
          <td className="num">
            <Payload carried={carriedOf(result)} />
          </td>
        </>
      )}
    </tr>
  );
}

/** What is carried for a Δv one types; without one, for what 200 km due east from the equator takes. */
function ChosenDeltaV({ vehicle, usual }: { vehicle: VehicleInput; usual: number | null }) {
  const [typed, setTyped] = useState('');
  const read = readTypedNumber(typed);
  const fits = typeof read === 'number' && read >= 0 && read <= MOST_DELTA_V_MPS;
  const deltaV = read === undefined ? usual : fits ? read : null;
  const carried = deltaV === null ? null : carriedFor(vehicle, deltaV);
  return (
    <div className="flex flex-wrap items-start gap-4">
      <div className="w-44">
        <NumberField
          label="For a total Δv of"
          unit="m/s"
          value={typed}
          placeholder={usual === null ? '' : formatNumber(usual)}
          hint="Losses and reserve counted in"
          error={
            read === undefined || fits
              ? undefined
              : `A Δv lies between 0 and ${formatNumber(MOST_DELTA_V_MPS)} m/s.`
          }
          onChange={(event) => setTyped(event.target.value)}
        />
      </div>
      <p className="pt-[1.625rem] text-md" role="status">
        {carried === null ? (
          'no payload to show'
        ) : 'payloadKg' in carried ? (
          <>
            <b className="num font-medium">{formatNumber(carried.payloadKg)}</b> kg
          </>
        ) : (
          <Payload carried={carried} />
        )}
      </p>
    </div>
  );
}

/** The payload check beside the vehicle's form, by the same code as everything else. */
export function PayloadCheck({ vehicle, orbits, turnSpeedFraction }: CheckProps) {
  const flights = useMemo(
    () => (vehicle ? flightsFromEquator(vehicle, orbits, turnSpeedFraction) : null),
    [vehicle, orbits, turnSpeedFraction],
  );
  if (!vehicle || !flights)
    return <p className="text-sm text-ink-2">Payloads stand here once the vehicle is whole.</p>;
  const { low, manifest } = flights;
  return (
    <>
      <ChosenDeltaV vehicle={vehicle} usual={low?.deltaVMps.total ?? null} />
      <table className="mt-4 table" data-dense="">
        <thead>
          <tr>
            <th scope="col">From the equator to</th>
            <th scope="col" className="num">
              Δv <span className="unit">m/s</span>
            </th>
            <th scope="col" className="num">
              Payload <span className="unit">kg</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {low && <OrbitRow name="200 km circle, due east" result={low} />}
          {orbits.map((orbit, index) => {
            const result = manifest[index];
            return result && <OrbitRow key={orbit.id} name={nameOfOrbit(orbit)} result={result} />;
          })}
        </tbody>
      </table>
      <p className="caption">Estimates for comparing sites, not flight data.</p>
    </>
  );
}

import { useState } from 'react';
import { Button } from '#components/ui/index.ts';
import type { SiteResult } from '#contract/evaluate.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { AzimuthRose } from './AzimuthRose.tsx';
import { BudgetKey, BudgetLines } from './BudgetLines.tsx';
import { BudgetTable } from './BudgetTable.tsx';
import { withOthers } from './compute.ts';
import { GainChart, type CurveOf } from './GainChart.tsx';
import { usualInjectionSpeedMps } from './gain-curves.ts';
import type { OrbitOfRose } from './rose-marks.ts';
import type { FlightRow } from './rows.ts';
import { WaysTable } from './WaysTable.tsx';

const ROWS_AT_FIRST = 50;

interface OrbitSheetProps {
  inputs: StudyInputs;
  results: readonly SiteResult[];
  rows: readonly FlightRow[];
  orbitIndex: number;
  chosenCode: string;
  onChoose: (code: string) => void;
}

function Sources({ vehicle }: { vehicle: StudyInputs['vehicle'] }) {
  if (!vehicle)
    return (
      <p className="caption">
        No vehicle yet: losses and reserve are 0 and there is no payload. Choose one in Requirement.
      </p>
    );
  const { gravity, drag, steering } = vehicle.lossesMps;
  return (
    <p className="caption">
      <b>Losses {formatNumber(gravity + drag + steering)} m/s at every site</b>, entered for the vehicle:
      gravity {formatNumber(gravity)}, drag {formatNumber(drag)}, steering {formatNumber(steering)}. Reserve{' '}
      {formatNumber(vehicle.reserveMps)} m/s.
    </p>
  );
}

function curvesOf({ inputs, results }: OrbitSheetProps): CurveOf[] {
  return inputs.orbits.flatMap((orbit, i) => {
    const ofOrbit = results.flatMap(({ orbits }) => orbits[i] ?? []);
    const injectionSpeedMps = usualInjectionSpeedMps(ofOrbit);
    const inclinationDeg = ofOrbit[0]?.inclinationDeg;
    return injectionSpeedMps === null || inclinationDeg === undefined
      ? []
      : [{ orbit, inclinationDeg, injectionSpeedMps }];
  });
}

/** One target orbit: every site's budget, what the turning Earth gives, and one site's azimuths and ways. */
export function OrbitSheet(props: OrbitSheetProps) {
  const { inputs, results, rows, orbitIndex, chosenCode, onChoose } = props;
  const [count, setCount] = useState(ROWS_AT_FIRST);
  const orbit = inputs.orbits[orbitIndex];
  const chosenRow = rows.find(({ site }) => site.code === chosenCode);
  if (!orbit || !chosenRow) return null;
  const { site } = chosenRow;
  const curves = curvesOf(props);
  const siteIndex = inputs.sites.indexOf(site);
  const rose = curves.flatMap(({ orbit: of, injectionSpeedMps }): OrbitOfRose[] => {
    const result = results[siteIndex]?.orbits[inputs.orbits.indexOf(of)];
    return result
      ? [{ orbit: of, result, injectionSpeedMps: result.injectionSpeedMps ?? injectionSpeedMps }]
      : [];
  });
  return (
    <>
      <BudgetTable
        rows={rows.slice(0, count)}
        losses={inputs.vehicle?.lossesMps ?? null}
        hasVehicle={inputs.vehicle !== null}
        chosenCode={chosenCode}
        onChoose={onChoose}
      />
      {rows.length > count && (
        <div className="mt-3 flex items-center gap-4">
          <Button onClick={() => setCount(count + 200)}>Show 200 more sites</Button>
          <span className="caption">
            {formatNumber(count)} of {formatCount(rows.length, 'site')}, cheapest first
          </span>
        </div>
      )}
      <div className="mt-3 grid gap-2">
        <BudgetKey />
        <Sources vehicle={inputs.vehicle} />
        <BudgetLines rows={rows.slice(0, count)} losses={inputs.vehicle?.lossesMps ?? null} />
      </div>
      <div className="mt-10 grid gap-x-14 gap-y-10 sheet:grid-cols-2">
        <GainChart curves={curves} chosenOrbit={orbit.code} rows={rows} chosenCode={chosenCode} />
        <AzimuthRose site={site} orbits={rose} chosenOrbit={orbit.code} />
      </div>
      <div className="mt-10">
        <WaysTable site={site} orbit={orbit} result={withOthers(inputs, site, orbit) ?? chosenRow.result} />
      </div>
    </>
  );
}

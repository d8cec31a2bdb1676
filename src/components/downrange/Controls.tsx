import { useId, useState } from 'react';
import { Button, NumberField, Panel, Select, Switch } from '#components/ui/index.ts';
import { formatNumber, readTypedNumber } from '#contract/format.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { TableClass } from '#contract/vehicle-class.ts';
import { VEHICLE_CLASSES } from '#core/downrange/vehicle-class.ts';
import { AreaFields } from './AreaFields.tsx';
import { CLASS_NAMES, RANGES_KM, azimuthFrom, type Launch } from './launch.ts';
import type { LaunchDesk } from './use-launch.ts';
import { degrees } from './words.ts';

interface ControlsProps {
  inputs: StudyInputs;
  launch: Launch;
  desk: LaunchDesk;
  told: TableClass | null;
}

/** "Rowan M lifts 9,120 kg to 100 nm at 28° (large) and 6,900 kg at 90° (medium large)": where the class comes from. */
function classHint(told: TableClass | null): string {
  if (!told) return 'The study has no vehicle: choose the class.';
  const columns = told.columns.map(({ inclinationDeg, payloadKg, vehicleClass }) =>
    payloadKg === null || vehicleClass === null
      ? `falls short at ${inclinationDeg}°`
      : `${formatNumber(payloadKg)} kg at ${inclinationDeg}°: ${CLASS_NAMES[vehicleClass].toLowerCase()}`,
  );
  return `By payload to 100 nm circular (14 CFR 420.19, table 1): the study’s vehicle has ${columns.join('; ')}.`;
}

/** The azimuth as a field: read on leaving it or on Enter. */
function AzimuthField({ launch, desk }: Pick<ControlsProps, 'launch' | 'desk'>) {
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | undefined>();
  const settle = () => {
    if (typed === null) return;
    const read = readTypedNumber(typed);
    const azimuth = typeof read === 'number' ? azimuthFrom(String(read)) : null;
    if (azimuth === null) {
      setError('An azimuth is a number from 0 to 360, clockwise from north.');
      return;
    }
    setError(undefined);
    setTyped(null);
    desk.setAzimuth(azimuth);
  };
  return (
    <NumberField
      label="Launch azimuth"
      unit="°"
      value={typed ?? formatNumber(launch.azimuthDeg, Number.isInteger(launch.azimuthDeg) ? 0 : 1)}
      error={error}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={settle}
      onKeyDown={(event) => {
        if (event.key === 'Enter') settle();
      }}
    />
  );
}

function AzimuthSlider({ launch, desk }: Pick<ControlsProps, 'launch' | 'desk'>) {
  const id = useId();
  return (
    <div className="downrange-slider">
      <label htmlFor={id} className="sr-only">
        Turn the launch azimuth
      </label>
      <input
        id={id}
        type="range"
        min={0}
        max={359}
        step={1}
        value={Math.round(launch.azimuthDeg) % 360}
        aria-valuetext={`${degrees(launch.azimuthDeg)} clockwise from north`}
        onChange={(event) => desk.setAzimuth(event.target.valueAsNumber)}
      />
    </div>
  );
}

function FlownButtons({ launch, desk }: Pick<ControlsProps, 'launch' | 'desk'>) {
  if (desk.flown.length === 0) return null;
  return (
    <div className="downrange-flown" role="group" aria-label="Launch azimuths flown from this site">
      {desk.flown.map(({ name, azimuthDeg }) => (
        <Button
          key={name}
          size="small"
          aria-pressed={azimuthDeg === launch.azimuthDeg}
          onClick={() => desk.setAzimuth(azimuthDeg)}
        >
          {`${name} ${degrees(azimuthDeg)}`}
        </Button>
      ))}
    </div>
  );
}

function DensityField({ launch, desk }: Pick<ControlsProps, 'launch' | 'desk'>) {
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | undefined>();
  const settle = () => {
    if (typed === null) return;
    const read = readTypedNumber(typed);
    if (typeof read !== 'number' || read < 1 || read > 100_000) {
      setError('A density lies between 1 and 100,000 people to the km².');
      return;
    }
    setError(undefined);
    setTyped(null);
    desk.setDensity(String(read));
  };
  return (
    <NumberField
      label="People to the km² within a settlement"
      unit="per km²"
      hint="A settlement’s area is its people over this. Default 1,500: an assumption."
      value={typed ?? formatNumber(launch.densityPerKm2)}
      error={error}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={settle}
    />
  );
}

/** What is looked at, and on which assumptions. Everything typed here lives in the address. */
export function Controls({ inputs, launch, desk, told }: ControlsProps) {
  const { site, vehicleClass, rangeKm, spread } = launch;
  return (
    <Panel title="Launch" caption="Azimuths are true, clockwise from north at the pad.">
      <div className="downrange-controls">
        <Select
          label="Site"
          value={site.code}
          choices={inputs.sites.map(({ code, name }) => ({ value: code, name: `${name} (${code})` }))}
          onChange={(event) => desk.setSite(event.target.value)}
        />
        <div>
          <AzimuthField launch={launch} desk={desk} />
          <AzimuthSlider launch={launch} desk={desk} />
        </div>
        <Select
          label="Vehicle class"
          value={vehicleClass}
          choices={VEHICLE_CLASSES.map((value) => ({ value, name: CLASS_NAMES[value] }))}
          hint={classHint(told)}
          onChange={(event) => desk.setClass(event.target.value)}
        />
        <Select
          label="Range"
          value={String(rangeKm)}
          choices={RANGES_KM.map((one) => ({ value: String(one), name: `${formatNumber(one)} km` }))}
          hint="Of corridor and fan. 9,260 km is the regulation’s 5,000 nautical miles."
          onChange={(event) => desk.setRange(event.target.value)}
        />
      </div>
      <FlownButtons launch={launch} desk={desk} />
      <details className="downrange-assumptions">
        <summary>Assumptions: spread people, density, casualty areas</summary>
        <div className="downrange-controls mt-3">
          <Switch
            label="Count people spread over the land"
            hint="Each country’s people beyond the listed settlements, spread evenly over its land: an assumption."
            checked={spread}
            onChange={(event) => desk.setSpread(event.target.checked)}
          />
          <DensityField launch={launch} desk={desk} />
          <AreaFields key={vehicleClass} launch={launch} onAreas={desk.setAreas} />
        </div>
      </details>
    </Panel>
  );
}

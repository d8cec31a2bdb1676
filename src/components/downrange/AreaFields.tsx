import { useState } from 'react';
import { Button, NumberField } from '#components/ui/index.ts';
import { formatFull, readTypedNumber } from '#contract/format.ts';
import { REMEMBERED_CASUALTY_AREAS, VERIFY_CASUALTY_AREAS } from '#core/downrange/casualty.ts';
import type { Launch } from './launch.ts';

const SQUARE_MILE = 1609.344 ** 2;
const BANDS = ['below 50 nm', '50 to 1,750 nm', 'from 1,750 nm'] as const;

const remembered = ({ vehicleClass }: Launch): number[] =>
  REMEMBERED_CASUALTY_AREAS[vehicleClass].map((area) => Number((area / SQUARE_MILE).toPrecision(6)));

interface AreaFieldsProps {
  launch: Launch;
  /** Three areas with commas between, or null for those remembered. */
  onAreas: (areas: string | null) => void;
}

/** The effective casualty areas: the class's as remembered, to be checked, or typed. */
export function AreaFields({ launch, onAreas }: AreaFieldsProps) {
  const areas = launch.areasMi2 ?? remembered(launch);
  const [typed, setTyped] = useState<readonly (string | null)[]>([null, null, null]);
  const read = typed.map((text, at) => (text === null ? (areas[at] ?? NaN) : readTypedNumber(text)));
  const isArea = (value: unknown): value is number => typeof value === 'number' && value > 0 && value <= 100;
  const settle = () => {
    if (typed.every((text) => text === null) || !read.every(isArea)) return;
    onAreas(read.join(','));
    setTyped([null, null, null]);
  };
  return (
    <fieldset className="downrange-areas">
      <legend>
        Effective casualty areas: <b>{VERIFY_CASUALTY_AREAS}</b>
      </legend>
      <p className="caption">
        Table C-3 of 14 CFR part 420, as remembered for the class, in square statute miles.
      </p>
      {BANDS.map((band, at) => (
        <NumberField
          key={band}
          label={band}
          unit="mi²"
          value={typed[at] ?? formatFull(areas[at] ?? NaN)}
          error={
            typed[at] !== null && !isArea(read[at]) ? 'An area is above 0 and at most 100 mi².' : undefined
          }
          onChange={(event) => {
            const { value } = event.target;
            setTyped((now) => now.map((text, place) => (place === at ? value : text)));
          }}
          onBlur={settle}
        />
      ))}
      {launch.areasMi2 && (
        <Button size="small" onClick={() => onAreas(null)}>
          Take the remembered areas
        </Button>
      )}
    </fieldset>
  );
}

import { useId } from 'react';
import { formatLatitude, formatLongitude, formatNumber } from '#contract/format.ts';
import type { PathPlace } from './path.ts';
import { PROFILES, type Moment } from './profile.ts';

interface TimeSliderProps {
  timeS: number;
  burnOutS: number;
  onTime: (timeS: number) => void;
  moment: Moment | undefined;
  /** Where it would come down; null once it would no more. */
  impact: PathPlace | null;
}

const wrapped = (longitudeDeg: number): number => longitudeDeg - 360 * Math.round(longitudeDeg / 360);

/** A moment of the flight chosen by hand or by the arrow keys, a second a step; the figures of it beside. */
export function TimeSlider({ timeS, burnOutS, onTime, moment, impact }: TimeSliderProps) {
  const id = useId();
  const words = `${formatNumber(timeS)} s after lift-off, ${formatNumber(moment?.altitudeKm ?? 0, 1)} km up`;
  return (
    <div className="flown-slider">
      <label htmlFor={id} className="font-medium">
        Time from lift-off
      </label>
      <input
        id={id}
        type="range"
        min={0}
        max={Math.ceil(burnOutS)}
        step={1}
        value={timeS}
        aria-valuetext={words}
        onChange={(event) => onTime(event.target.valueAsNumber)}
      />
      <dl className="flown-readout">
        <div>
          <dt>Time</dt>
          <dd className="num">{formatNumber(timeS)} s</dd>
        </div>
        {PROFILES.map(({ key, name, unit, decimals }) => (
          <div key={key}>
            <dt>{name}</dt>
            <dd className="num">
              {moment ? formatNumber(moment[key], decimals) : '–'} {unit}
            </dd>
          </div>
        ))}
        <div>
          <dt>Downrange</dt>
          <dd className="num">{moment ? formatNumber(moment.downrangeKm) : '–'} km</dd>
        </div>
        <div>
          <dt>Would come down at</dt>
          <dd className="num">
            {impact
              ? `${formatLatitude(impact[1], 1)}, ${formatLongitude(wrapped(impact[0]), 1)}`
              : 'nowhere: in orbit'}
          </dd>
        </div>
      </dl>
    </div>
  );
}

import { useRef, type KeyboardEvent, type MouseEvent } from 'react';
import type { FanSpoke, StudyFan } from '#contract/downrange.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import {
  BASE,
  INNER,
  OUTER,
  PEOPLE_TICKS,
  arcsOf,
  at,
  azimuthAt,
  barPath,
  circlePath,
  clearKm,
  distanceRadius,
  distanceTicks,
  peopleOf,
  peopleRadius,
  ringPath,
} from './fan-geometry.ts';
import { turned } from './launch.ts';
import { degrees, km, roughly } from './words.ts';

const HALF = 244;
const NAMED: Readonly<Record<number, string>> = { 0: 'N', 90: 'E', 180: 'S', 270: 'W' };
const STEPS: Readonly<Record<string, number>> = {
  ArrowRight: 1,
  ArrowUp: 1,
  ArrowLeft: -1,
  ArrowDown: -1,
  PageUp: 10,
  PageDown: -10,
};

const inSector = (azimuthDeg: number, sectors: readonly (readonly [number, number])[]): boolean =>
  sectors.length === 0 ||
  sectors.some(([from, to]) => {
    const width = (to - from + 360) % 360 || 360;
    return (azimuthDeg - from + 360) % 360 <= width;
  });

/** What one azimuth found, in words. */
export function spokeInWords(spoke: FanSpoke, rangeKm: number): string {
  const clear = clearKm(spoke);
  const land =
    spoke.coastKm === null
      ? 'never leaves land'
      : clear === null
        ? `no land found within ${km(rangeKm)}`
        : `first land after ${km(clear)}${spoke.firstLandName ? `, ${spoke.firstLandName}` : ''}`;
  return `${land}; about ${roughly(peopleOf(spoke))} people`;
}

function Dial({ rangeKm }: { rangeKm: number }) {
  return (
    <g>
      {distanceTicks(rangeKm).map((tick) => (
        <path key={tick} d={circlePath(distanceRadius(tick, rangeKm))} className="grid-line" />
      ))}
      {PEOPLE_TICKS.map(({ people }) => (
        <path key={people} d={circlePath(peopleRadius(people))} className="grid-line" />
      ))}
      {Array.from({ length: 12 }, (_, step) => step * 30).map((deg) => {
        const [x, y] = at(deg, OUTER + 18);
        return (
          <text key={deg} x={x} y={y + 4} textAnchor="middle" className={NAMED[deg] ? 'strong' : 'tick'}>
            {NAMED[deg] ?? deg}
          </text>
        );
      })}
    </g>
  );
}

/** Labels of the circles, over the bars, along one direction where they keep clear of the numbers round the dial. */
function Scales({ rangeKm }: { rangeKm: number }) {
  const ticks = distanceTicks(rangeKm);
  return (
    <g>
      {ticks.map((tick) => {
        const [x, y] = at(45, distanceRadius(tick, rangeKm));
        return (
          <text key={tick} x={x} y={y + 4} textAnchor="middle" className="tick halo">
            {formatNumber(tick)}
            {tick === ticks.at(-1) ? ' km' : ''}
          </text>
        );
      })}
      {PEOPLE_TICKS.map(({ people, name }) => {
        const [x, y] = at(225, peopleRadius(people));
        return (
          <text key={people} x={x} y={y + 4} textAnchor="middle" className="tick halo">
            {name}
          </text>
        );
      })}
    </g>
  );
}

function Bars({ fan, sectors }: { fan: StudyFan; sectors: readonly (readonly [number, number])[] }) {
  const paths = { in: '', out: '' };
  for (const spoke of fan.spokes) {
    const clear = clearKm(spoke);
    const people = barPath(spoke.azimuthDeg, BASE, peopleRadius(peopleOf(spoke)));
    const distance = barPath(spoke.azimuthDeg, BASE, distanceRadius(clear, fan.rangeKm));
    paths[inSector(spoke.azimuthDeg, sectors) ? 'in' : 'out'] += people + distance;
  }
  const open = arcsOf(fan.spokes, (spoke) => clearKm(spoke) === null);
  return (
    <g>
      <path d={paths.out} className="fan-out" />
      <path d={paths.in} className="fan-in" />
      {open.map(([from, to]) => (
        <path key={from} d={arcPath(from, to)} className="fan-open" />
      ))}
    </g>
  );
}

/** The outer end of bars where no land was found: dotted. */
function arcPath(from: number, to: number): string {
  if (to - from >= 360) return circlePath(OUTER);
  const [start, end] = [at(from, OUTER), at(to, OUTER)].map(([x, y]) => `${x.toFixed(2)} ${y.toFixed(2)}`);
  return `M${start}A${OUTER} ${OUTER} 0 ${to - from > 180 ? 1 : 0} 1 ${end}`;
}

interface AzimuthFanProps {
  fan: StudyFan;
  site: InputSite;
  azimuthDeg: number;
  onAzimuth: (azimuthDeg: number) => void;
}

/**
 * The polar fan: outwards from the circle the distance to the first land, inwards the people in the corridor. One stop
 * of the keyboard: arrows turn the azimuth by 1°, with Shift by 0.1°, Page keys by 10°; a click takes the one under it.
 */
export function AzimuthFan({ fan, site, azimuthDeg, onAzimuth }: AzimuthFanProps) {
  const drawing = useRef<SVGSVGElement>(null);
  const sectors = site.permittedAzimuthsDeg;
  const whole = Math.round(azimuthDeg) % 360;
  const spoke = fan.spokes[whole];
  const turn = (event: KeyboardEvent) => {
    const step = STEPS[event.key];
    if (step === undefined) return;
    event.preventDefault();
    onAzimuth(turned(azimuthDeg, event.shiftKey && Math.abs(step) === 1 ? step / 10 : step));
  };
  const pick = (event: MouseEvent) => {
    const box = drawing.current?.getBoundingClientRect();
    if (!box) return;
    onAzimuth(azimuthAt(event.clientX - box.left - box.width / 2, event.clientY - box.top - box.height / 2));
  };
  const [x, y] = at(azimuthDeg, OUTER + 6);
  const [x0, y0] = at(azimuthDeg, INNER - 10);
  return (
    <div
      className="downrange-fan"
      role="slider"
      tabIndex={0}
      aria-label={`Launch azimuth from ${site.name}, on the fan`}
      aria-valuemin={0}
      aria-valuemax={360}
      aria-valuenow={azimuthDeg}
      aria-valuetext={`${degrees(azimuthDeg)}: ${spoke ? spokeInWords(spoke, fan.rangeKm) : ''}`}
      onKeyDown={turn}
      onClick={pick}
    >
      <svg
        ref={drawing}
        className="chart"
        viewBox={`${-HALF} ${-HALF} ${2 * HALF} ${2 * HALF}`}
        aria-hidden="true"
      >
        {sectors.map((sector) => (
          <path
            key={sector.join()}
            d={ringPath(...sector, INNER, OUTER)}
            className="fill-sector"
            fillRule="evenodd"
          />
        ))}
        <Dial rangeKm={fan.rangeKm} />
        <Bars fan={fan} sectors={sectors} />
        <path d={circlePath(BASE)} className="fan-base" />
        <Scales rangeKm={fan.rangeKm} />
        <path d={`M${x0} ${y0}L${x} ${y}`} className="fan-azimuth" />
        <text y="-4" textAnchor="middle" className="signal-text">
          {degrees(azimuthDeg)}
        </text>
        <text y="14" textAnchor="middle" className="label-2">
          {site.code}
        </text>
      </svg>
    </div>
  );
}

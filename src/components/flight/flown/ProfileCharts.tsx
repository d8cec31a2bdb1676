import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { Chart, XAxis, YAxis } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import type { FlightEvent } from './events.ts';
import { MomentsTable } from './MomentsTable.tsx';
import { momentAt, PROFILES, type Along, type Moment, type ProfileKey } from './profile.ts';

const WIDTH = 800;
const LEFT = 52;
const RIGHT = 640;
const HEIGHT = 112;
const GAP = 30;
const ROW = 15;
const EVENT_ROWS = 3;
const TOP = EVENT_ROWS * ROW + 12;
const BOTTOM = TOP + PROFILES.length * (HEIGHT + GAP) - GAP;
/** Letters of an event's words take about this many pixels. */
const LETTER = 6.2;

export interface Flown {
  name: string;
  code: string;
  moments: readonly Moment[];
}

interface ProfileChartsProps {
  flown: Flown;
  /** Drawn on the same axes, dashed. */
  other: Flown | null;
  events: readonly FlightEvent[];
  limits: Partial<Record<ProfileKey, number>>;
  along: Along;
  timeS: number;
  orbitName: string;
}

type Scale = (value: number) => number;

/** Event names in up to three rows, each in the first where it covers none before it; later ones go without. */
function eventRows(events: readonly FlightEvent[], at: (event: FlightEvent) => number) {
  const ends = Array.from({ length: EVENT_ROWS }, () => -Infinity);
  return events.map((event) => {
    const x = at(event);
    const half = (event.words.length * LETTER) / 2;
    const row = ends.findIndex((end) => x - half > end);
    if (row >= 0) ends[row] = x + half + 8;
    return { event, x, row };
  });
}

function Events({ events, at }: { events: readonly FlightEvent[]; at: (event: FlightEvent) => number }) {
  return eventRows(events, at).map(({ event, x, row }) => (
    <g key={`${event.timeS} ${event.words}`}>
      <path className="axis dotted" d={`M${x} ${row < 0 ? TOP : row * ROW + 14}V${BOTTOM}`} />
      {row >= 0 && (
        <text className="label-2 halo" x={x} y={row * ROW + 11} textAnchor="middle">
          {event.words}
        </text>
      )}
    </g>
  ));
}

interface PanelProps extends Pick<ProfileChartsProps, 'flown' | 'other' | 'along'> {
  profile: (typeof PROFILES)[number];
  limit: number | undefined;
  top: number;
  x: Scale;
}

/** One figure of the flight: its line, the other site's dashed, and the limit it is flown within. */
function Profile({ profile, flown, other, along, limit, top, x }: PanelProps) {
  const { key, name, unit, decimals } = profile;
  const both = other ? [...flown.moments, ...other.moments] : flown.moments;
  const most = Math.max(limit ?? 0, ...both.map((moment) => moment[key]));
  const y = scaleLinear([0, most || 1], [top + HEIGHT, top]).nice(3);
  const pathOf = line<Moment>(
    (moment) => x(moment[along]),
    (moment) => y(moment[key]),
  );
  const ends = [flown, ...(other ? [other] : [])].map(({ code, moments }, at) => ({
    code,
    y: y(moments.at(-1)?.[key] ?? 0) + 4,
    strong: at === 0,
  }));
  const [first, second] = ends;
  // Two names at one height are put one over the other.
  if (first && second && Math.abs(first.y - second.y) < 13)
    second.y = first.y + (second.y < first.y ? -13 : 13);
  const lastX = Math.max(...both.map((moment) => x(moment[along])));
  return (
    <g>
      <YAxis ticks={y.ticks(3)} at={y} from={LEFT} to={RIGHT} labelX={LEFT - 8} />
      <path className="axis" d={`M${LEFT} ${y(0)}H${RIGHT}`} />
      {limit !== undefined && (
        <>
          <path className="line-2 dashed" d={`M${LEFT} ${y(limit)}H${RIGHT}`} />
          <text className="label-2 halo" x={LEFT + 4} y={y(limit) - 4}>
            limit {formatNumber(limit, Number.isInteger(limit) ? 0 : decimals)}
          </text>
        </>
      )}
      {other && <path className="line-2 dashed" d={pathOf([...other.moments]) ?? ''} />}
      <path className="line" d={pathOf([...flown.moments]) ?? ''} />
      {other &&
        ends.map(({ code, y: at, strong }) => (
          <text key={code} x={lastX + 6} y={at} className={strong ? 'strong halo' : 'label-2 halo'}>
            {code}
          </text>
        ))}
      <text className="strong" x={RIGHT + 48} y={top + 12}>
        {name}
      </text>
      <text className="label-2" x={RIGHT + 48} y={top + 28}>
        {unit}
      </text>
    </g>
  );
}

const sentence = ({ flown, other, orbitName }: ProfileChartsProps): string => {
  const last = flown.moments.at(-1);
  const most = Math.max(...flown.moments.map(({ pressureKpa }) => pressureKpa));
  const beside = other ? `, with ${other.name} beside it` : '';
  return (
    `Ascent from ${flown.name} to ${orbitName}${beside}: burn-out after ${formatNumber(last?.timeS ?? 0)} s at ` +
    `${formatNumber(last?.altitudeKm ?? 0)} km and ${formatNumber(last?.speedMps ?? 0)} m/s, dynamic pressure up to ` +
    `${formatNumber(most, 1)} kPa`
  );
};

/** Altitude, speed, dynamic pressure and acceleration of a flight over one axis. */
export function ProfileCharts(props: ProfileChartsProps) {
  const { flown, other, events, limits, along, timeS } = props;
  const reach = [flown, other].flatMap((one) => one?.moments.at(-1)?.[along] ?? []);
  const x = scaleLinear([0, Math.max(...reach, 1)], [LEFT, RIGHT]);
  const alongAt = (time: number): number => x(momentAt(flown.moments, time)?.[along] ?? 0);
  return (
    <Chart
      label={sentence(props)}
      width={WIDTH}
      height={BOTTOM + 42}
      table={<MomentsTable flown={[flown, ...(other ? [other] : [])]} events={events} />}
    >
      <XAxis ticks={x.ticks(8)} at={x} from={TOP} to={BOTTOM + 5} labelY={BOTTOM + 20} />
      <Events events={events} at={({ timeS: time }) => alongAt(time)} />
      {PROFILES.map((profile, at) => (
        <Profile
          key={profile.key}
          profile={profile}
          flown={flown}
          other={other}
          along={along}
          limit={limits[profile.key]}
          top={TOP + at * (HEIGHT + GAP)}
          x={x}
        />
      ))}
      <path className="axis" d={`M${alongAt(timeS)} ${TOP - 6}V${BOTTOM + 5}`} />
      <text className="label-2" x={RIGHT} y={BOTTOM + 38} textAnchor="end">
        {along === 'timeS' ? 'time from lift-off, s' : 'downrange, km over the ground'}
      </text>
    </Chart>
  );
}

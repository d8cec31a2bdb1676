import { line } from 'd3-shape';
import { scaleLinear } from 'd3-scale';
import { Chart, Panel, XAxis, YAxis } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { dueEastCurve, gainCurve, type CurvePoint, type GainCurve } from './gain-curves.ts';
import type { FlightRow } from './rows.ts';

const WIDTH = 640;
const HEIGHT = 340;
const LEFT = 52;
const RIGHT = 522;
const TOP = 16;
const BOTTOM = 296;
/** Beyond this many codes would cover each other; the circles and the table still say which is which. */
const MOST_CODES = 24;

export interface CurveOf {
  orbit: InputOrbit;
  inclinationDeg: number;
  injectionSpeedMps: number;
}

interface GainChartProps {
  curves: readonly CurveOf[];
  chosenOrbit: string;
  rows: readonly FlightRow[];
  chosenCode: string;
}

interface Scales {
  x: (latitudeDeg: number) => number;
  y: (gainMps: number) => number;
}

const pathOf = (points: readonly CurvePoint[], { x, y }: Scales): string =>
  line<CurvePoint>(
    ([latitudeDeg]) => x(latitudeDeg),
    ([, gainMps]) => y(gainMps),
  )([...points]) ?? '';

function Curve({ curve, chosen, scales }: { curve: GainCurve; chosen: boolean; scales: Scales }) {
  const end = curve.points.at(-1);
  return (
    <>
      <path d={pathOf(curve.points, scales)} className={chosen ? 'line' : 'line-2'} />
      {curve.endDeg !== null && end && (
        <path d={`M${scales.x(end[0])} ${scales.y(end[1]) - 5}v10`} className={chosen ? 'line' : 'line-2'} />
      )}
    </>
  );
}

/** Labels at the right end, pushed apart so that none covers another. */
function spread(labels: { text: string; y: number; chosen: boolean }[]) {
  const sorted = [...labels].sort((a, b) => a.y - b.y);
  let least = -Infinity;
  return sorted.map((label) => {
    const y = Math.max(label.y, least + 14);
    least = y;
    return { ...label, y };
  });
}

function Candidates({
  rows,
  chosenCode,
  scales,
}: Pick<GainChartProps, 'rows' | 'chosenCode'> & { scales: Scales }) {
  const placed = rows
    .filter(({ result }) => result.way !== 'out-of-reach')
    .sort((a, b) => Math.abs(a.site.latitudeDeg) - Math.abs(b.site.latitudeDeg));
  return placed.map(({ site, result }, i) => {
    const chosen = site.code === chosenCode;
    const cx = scales.x(Math.abs(site.latitudeDeg));
    const cy = scales.y(result.rotationGainMps ?? 0);
    const labelled = chosen || placed.length <= MOST_CODES;
    return (
      <g key={site.siteId}>
        <circle cx={cx} cy={cy} r={chosen ? 6 : 4} className={chosen ? 'fill-signal' : 'candidate'} />
        {labelled && (
          <text
            x={cx}
            y={cy + (i % 2 === 0 ? -10 : 19)}
            textAnchor="middle"
            className={chosen ? 'halo signal-text' : 'halo'}
          >
            {site.code}
          </text>
        )}
      </g>
    );
  });
}

function AsTable({ rows }: Pick<GainChartProps, 'rows'>) {
  return (
    <table className="table" data-dense="">
      <thead>
        <tr>
          <th scope="col">Site</th>
          <th scope="col" className="num">
            Latitude<span className="unit">°, north or south</span>
          </th>
          <th scope="col" className="num">
            Rotation gain<span className="unit">m/s</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ site, result }) => (
          <tr key={site.siteId}>
            <th scope="row">{site.name}</th>
            <td className="num">{formatNumber(Math.abs(site.latitudeDeg), 2)}</td>
            <td className="num">
              {result.rotationGainMps === null ? 'out of reach' : formatNumber(result.rotationGainMps, 1)}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** What the turning Earth gives each orbit, against latitude, with the candidates on the chosen orbit's curve. */
export function GainChart({ curves, chosenOrbit, rows, chosenCode }: GainChartProps) {
  const furthest = Math.max(75, ...rows.map(({ site }) => Math.abs(site.latitudeDeg)));
  const most = Math.min(90, Math.ceil(furthest / 15) * 15);
  const drawn = curves.map((of) => ({
    ...of,
    curve: gainCurve(of.inclinationDeg, of.injectionSpeedMps, most),
    chosen: of.orbit.code === chosenOrbit,
  }));
  const east = dueEastCurve(most);
  const gains = [...drawn.flatMap(({ curve }) => curve.points), ...east].map(([, gain]) => gain);
  const figures = rows.flatMap(({ result }) => result.rotationGainMps ?? []);
  const [low, high] = [Math.min(0, ...gains, ...figures), Math.max(...gains, ...figures)];
  const x = scaleLinear([0, most], [LEFT, RIGHT]);
  const y = scaleLinear([Math.floor(low / 100) * 100, Math.ceil(high / 100) * 100], [BOTTOM, TOP]);
  const scales: Scales = { x, y };
  const labels = spread(
    drawn.flatMap(({ inclinationDeg, curve, chosen }) => {
      const end = curve.points.at(-1);
      return end ? [{ text: `${formatNumber(inclinationDeg, 1)}°`, y: y(end[1]) + 4, chosen }] : [];
    }),
  );
  return (
    <Panel
      title="Rotation gain against latitude"
      caption="m/s, at sea level. Each curve ends where the inclination equals the latitude; beyond it, a plane change is owed."
    >
      <Chart
        label="Rotation gain against latitude for each target orbit: nearly level for one inclination, whatever the latitude"
        width={WIDTH}
        height={HEIGHT}
        table={<AsTable rows={rows} />}
      >
        <YAxis ticks={y.ticks(6)} at={y} from={LEFT} to={RIGHT} labelX={LEFT - 8} />
        <XAxis ticks={x.ticks(6)} at={x} from={BOTTOM} to={BOTTOM + 5} labelY={BOTTOM + 20} />
        <path className="axis" d={`M${LEFT} ${y(0)}H${RIGHT}`} />
        <text className="label-2" x={RIGHT} y={BOTTOM + 38} textAnchor="end">
          latitude, ° north or south
        </text>
        <path d={pathOf(east, scales)} className="line-2 dashed" />
        <text className="label-2 halo" x={x(most * 0.42)} y={y(east[25]?.[1] ?? 0) - 14}>
          due east: ω times distance from the axis
        </text>
        {drawn.map(({ orbit, curve, chosen }) => (
          <Curve key={orbit.code} curve={curve} chosen={chosen} scales={scales} />
        ))}
        {labels.map(({ text, y: at, chosen }) => (
          <text key={text + at} x={RIGHT + 10} y={at} className={chosen ? 'strong' : 'label-2'}>
            {text}
          </text>
        ))}
        <Candidates rows={rows} chosenCode={chosenCode} scales={scales} />
      </Chart>
    </Panel>
  );
}

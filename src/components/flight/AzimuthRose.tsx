import { Chart, Panel } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { roseMarks, type OrbitOfRose, type RoseMark } from './rose-marks.ts';

const WIDTH = 660;
const HEIGHT = 424;
const CX = 330;
const CY = 212;
const RADIUS = 150;
const LABEL_GAP = 20;
const NAMED: Record<number, string> = { 0: 'N', 90: 'E', 180: 'S', 270: 'W' };

const at = (azimuthDeg: number, radius: number): [number, number] => {
  const angle = (azimuthDeg * Math.PI) / 180;
  return [CX + radius * Math.sin(angle), CY - radius * Math.cos(angle)];
};
const point = (azimuthDeg: number, radius: number): string =>
  at(azimuthDeg, radius)
    .map((n) => n.toFixed(2))
    .join(' ');

function sectorPath([from, to]: readonly [number, number]): string {
  const width = (((to - from) % 360) + 360) % 360;
  if (width === 0) return `M${CX} ${CY - RADIUS}A${RADIUS} ${RADIUS} 0 1 1 ${CX - 0.01} ${CY - RADIUS}Z`;
  return `M${CX} ${CY}L${point(from, RADIUS)}A${RADIUS} ${RADIUS} 0 ${width > 180 ? 1 : 0} 1 ${point(to, RADIUS)}Z`;
}

function Dial() {
  return (
    <g aria-hidden="true">
      <circle cx={CX} cy={CY} r={RADIUS} fill="none" className="axis" />
      {Array.from({ length: 72 }, (_, i) => i * 5).map((deg) => (
        <path
          key={deg}
          className="axis"
          d={`M${point(deg, RADIUS)}L${point(deg, RADIUS - (deg % 30 === 0 ? 9 : 4))}`}
        />
      ))}
      {Array.from({ length: 12 }, (_, i) => i * 30).map((deg) => {
        const [x, y] = at(deg, RADIUS - 20);
        return (
          <text
            key={deg}
            x={x}
            y={y + 4}
            textAnchor="middle"
            className={NAMED[deg] ? 'halo strong' : 'tick halo'}
          >
            {NAMED[deg] ?? deg}
          </text>
        );
      })}
    </g>
  );
}

interface Label extends RoseMark {
  side: 1 | -1;
  y: number;
}

/** Labels stand outside on leaders, on the side of their azimuth, at least 20 px apart. */
function labelsOf(marks: readonly RoseMark[]): Label[] {
  const sides: Label[][] = [[], []];
  for (const mark of marks) {
    const side = Math.sin((mark.azimuthDeg * Math.PI) / 180) >= 0 ? 1 : -1;
    sides[side > 0 ? 0 : 1]?.push({ ...mark, side, y: at(mark.azimuthDeg, RADIUS + 26)[1] });
  }
  return sides.flatMap((labels) => {
    labels.sort((a, b) => a.y - b.y);
    let least = 10;
    for (const label of labels) {
      label.y = Math.max(label.y, least);
      least = label.y + LABEL_GAP;
    }
    let most = HEIGHT - 8;
    for (const label of labels.toReversed()) {
      label.y = Math.min(label.y, most);
      most = label.y - LABEL_GAP;
    }
    return labels;
  });
}

function Mark({ mark }: { mark: RoseMark }) {
  const flown = mark.kind === 'flown';
  const dash = mark.kind === 'not-permitted' ? ' dashed' : '';
  return (
    <path
      d={`M${CX} ${CY}L${point(mark.azimuthDeg, RADIUS)}`}
      className={flown ? 'signal-line' : `axis${dash}`}
      strokeWidth={flown ? 4 : mark.chosen ? 2 : 1}
    />
  );
}

function Leader({ label }: { label: Label }) {
  const x = CX + label.side * (RADIUS + 34);
  const text = label.side > 0 ? x + 6 : x - 6;
  return (
    <g>
      <path
        className="grid-line"
        d={`M${point(label.azimuthDeg, RADIUS + 2)}L${x - label.side * 10} ${label.y}H${x}`}
      />
      <text
        x={text}
        y={label.y + 4}
        textAnchor={label.side > 0 ? 'start' : 'end'}
        className={label.kind === 'flown' ? 'signal-text' : label.chosen ? '' : 'label-2'}
      >
        {formatNumber(label.azimuthDeg, 1)} {label.words}
      </text>
    </g>
  );
}

function AsTable({ marks }: { marks: readonly RoseMark[] }) {
  return (
    <table className="table" data-dense="">
      <thead>
        <tr>
          <th scope="col" className="num">
            Launch azimuth<span className="unit">°</span>
          </th>
          <th scope="col">For</th>
        </tr>
      </thead>
      <tbody>
        {marks.map((mark) => (
          <tr key={mark.words}>
            <td className="num">{formatNumber(mark.azimuthDeg, 1)}</td>
            <th scope="row">{mark.words}</th>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

interface AzimuthRoseProps {
  site: InputSite;
  orbits: readonly OrbitOfRose[];
  chosenOrbit: string;
}

/** A site's permitted sectors with the launch azimuths of every target orbit: flown, permitted, not permitted. */
export function AzimuthRose({ site, orbits, chosenOrbit }: AzimuthRoseProps) {
  const marks = roseMarks(site, orbits, chosenOrbit);
  const sectors = site.permittedAzimuthsDeg;
  const ranges = sectors.map(([from, to]) => `${formatNumber(from)}° to ${formatNumber(to)}°`).join(', ');
  return (
    <Panel
      title={`Launch azimuths at ${site.name}`}
      caption={
        sectors.length === 0
          ? '° clockwise from north. All round is permitted.'
          : `° clockwise from north. Permitted: ${ranges}. Dashed azimuths lie outside.`
      }
    >
      <Chart
        label={`Launch azimuths at ${site.name}: ${marks.map((m) => `${formatNumber(m.azimuthDeg, 1)}° ${m.words}`).join('; ')}`}
        width={WIDTH}
        height={HEIGHT}
        table={<AsTable marks={marks} />}
      >
        <circle cx={CX} cy={CY} r={RADIUS} fill="var(--sheet)" />
        {(sectors.length === 0 ? ([[0, 360]] as const) : sectors).map((sector) => (
          <path key={sector.join()} d={sectorPath(sector)} className="fill-sector" />
        ))}
        <Dial />
        {marks.map((mark) => (
          <Mark key={mark.words} mark={mark} />
        ))}
        {labelsOf(marks).map((label) => (
          <Leader key={label.words} label={label} />
        ))}
      </Chart>
    </Panel>
  );
}

import { Panel } from '#components/ui/index.ts';
import type { FlownOrbit, FlownWay, OrbitResult } from '#contract/evaluate.ts';
import { formatFull, formatNumber } from '#contract/format.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';
import { toSite } from '#contract/to-core.ts';
import { padOf } from '#core/flight/pad.ts';
import { isPermitted } from '#core/flight/sectors.ts';
import { fromDegrees } from '#core/units.ts';
import { answersDeg } from './rose-marks.ts';
import { nameOf } from './words.ts';

const BAR_PX = 150;

interface Way {
  key: string;
  words: string;
  launchAzimuthDeg: number;
  turnDeg: number;
  way: FlownWay | FlownOrbit | null;
}

function waysOf(result: FlownOrbit): Way[] {
  return [result, ...result.others].map((way) => {
    const turnDeg = way.turnDeg + way.planeChangeDeg;
    const azimuth = `${formatNumber(way.launchAzimuthDeg, 1)}°`;
    const words = {
      direct: `Direct, ${way.branch}`,
      dogleg: `Dogleg from ${azimuth}`,
      'plane-change': `Plane change from ${azimuth}`,
    }[way.way];
    const profile = way.profile === 'parking' ? 'by the parking orbit' : 'straight to perigee';
    return {
      key: `${words}, ${way.profile}`,
      words: `${words}, ${profile}`,
      launchAzimuthDeg: way.launchAzimuthDeg,
      turnDeg,
      way,
    };
  });
}

/** Direct azimuths that the site's sectors shut: they have no budget, only a reason. */
function shutOf(site: InputSite, orbit: InputOrbit, result: FlownOrbit): Way[] {
  const pad = padOf(toSite(site));
  return answersDeg(pad, { orbit, result, injectionSpeedMps: result.injectionSpeedMps })
    .filter((azimuthDeg) => !isPermitted(pad.sectors, fromDegrees(azimuthDeg)))
    .map((launchAzimuthDeg) => {
      const northerly = Math.cos(fromDegrees(launchAzimuthDeg)) >= -1e-9;
      const words = `Direct, ${northerly ? 'northerly' : 'southerly'}`;
      return { key: `${words} shut`, words, launchAzimuthDeg, turnDeg: 0, way: null };
    });
}

function Above({ mps, most }: { mps: number; most: number }) {
  return (
    <span className="inline-flex items-center gap-2">
      {mps > 0 && (
        <svg width={(mps / most) * BAR_PX} height="10" aria-hidden="true">
          <rect width="100%" height="10" className="fill-2" />
        </svg>
      )}
      <span className="num">{formatNumber(mps)}</span>
    </span>
  );
}

function Row({ row, flown, most }: { row: Way; flown: FlownOrbit; most: number }) {
  const { way } = row;
  const isFlown = way === flown;
  const cost = way ? way.deltaVMps.dogleg + way.deltaVMps.planeChange : 0;
  return (
    <tr aria-selected={isFlown} data-set-aside={way ? undefined : ''}>
      <td>{isFlown && <span className="font-semibold text-signal">Flown</span>}</td>
      <th scope="row">{row.words}</th>
      <td className="num">{formatNumber(row.launchAzimuthDeg, 1)}</td>
      <td className="num">{formatNumber(row.turnDeg, 1)}</td>
      <td className="num max-tablet:hidden">{way ? formatNumber(cost) : '–'}</td>
      <td className="num" title={way ? formatFull(way.deltaVMps.total) : undefined}>
        {way ? formatNumber(way.deltaVMps.total) : '–'}
      </td>
      <td className="num">
        {!way
          ? 'azimuth not permitted'
          : way.payloadKg !== null
            ? formatNumber(way.payloadKg)
            : way.shortfallMps !== null
              ? `falls short by ${formatNumber(way.shortfallMps)} m/s`
              : '–'}
      </td>
      <td className="max-tablet:hidden">
        {way && <Above mps={way.deltaVMps.total - flown.deltaVMps.total} most={most} />}
      </td>
    </tr>
  );
}

interface WaysTableProps {
  site: InputSite;
  orbit: InputOrbit;
  result: OrbitResult;
}

/** The way flown and the ways not taken, cheapest first, with those that the sectors shut. */
export function WaysTable({ site, orbit, result }: WaysTableProps) {
  if (result.way === 'out-of-reach')
    return (
      <Panel title={`${site.name}, ${nameOf(orbit)}: out of reach`}>
        <p className="max-w-prose text-ink-2">
          Every way would owe a turn or plane change of more than 60°. Wider permitted azimuths, or another
          inclination, would open it.
        </p>
      </Panel>
    );
  const rows = [...waysOf(result), ...shutOf(site, orbit, result)];
  const most = Math.max(1, ...rows.map(({ way }) => (way?.deltaVMps.total ?? 0) - result.deltaVMps.total));
  return (
    <Panel title={`${site.name}, ${nameOf(orbit)}: the way flown and the ways not taken`}>
      <div className="table-scroll">
        <table className="table">
          <thead>
            <tr>
              <th scope="col">
                <span className="sr-only">Flown</span>
              </th>
              <th scope="col">Way</th>
              <th scope="col" className="num">
                Launch azimuth<span className="unit">°</span>
              </th>
              <th scope="col" className="num">
                Turn<span className="unit">°</span>
              </th>
              <th scope="col" className="num max-tablet:hidden">
                Cost of the turn<span className="unit">m/s</span>
              </th>
              <th scope="col" className="num">
                Total Δv<span className="unit">m/s</span>
              </th>
              <th scope="col" className="num">
                Payload<span className="unit">kg</span>
              </th>
              <th scope="col" className="max-tablet:hidden">
                Above the way flown<span className="unit">m/s</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <Row key={row.key} row={row} flown={result} most={most} />
            ))}
          </tbody>
        </table>
      </div>
    </Panel>
  );
}

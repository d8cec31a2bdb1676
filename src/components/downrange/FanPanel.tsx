import { Panel } from '#components/ui/index.ts';
import type { StudyFan } from '#contract/downrange.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { AzimuthFan, spokeInWords } from './AzimuthFan.tsx';
import { clearKm } from './fan-geometry.ts';
import { degrees, km, roughly } from './words.ts';

interface FanPanelProps {
  fan: StudyFan;
  site: InputSite;
  azimuthDeg: number;
  onAzimuth: (azimuthDeg: number) => void;
}

/** The fan with its twin as a table. */
export function FanPanel({ fan, site, azimuthDeg, onAzimuth }: FanPanelProps) {
  const spoke = fan.spokes[Math.round(azimuthDeg) % 360];
  return (
    <Panel
      title={`Azimuth fan of ${site.name}`}
      caption={`Every whole degree, out to ${km(fan.rangeKm)}. Outwards: distance to the first land, dotted where none was found. Inwards: people in the corridor, on a scale of powers of ten. ${site.permittedAzimuthsDeg.length === 0 ? 'All round is permitted.' : 'The filled sector is permitted; bars outside it are paler.'}`}
    >
      <AzimuthFan fan={fan} site={site} azimuthDeg={azimuthDeg} onAzimuth={onAzimuth} />
      {spoke && (
        <p className="downrange-readout" aria-live="polite">
          <b className="num">{degrees(spoke.azimuthDeg)}</b> {spokeInWords(spoke, fan.rangeKm)}.
        </p>
      )}
      <details className="chart-as-table">
        <summary>As a table</summary>
        <div
          className="table-scroll downrange-long"
          role="region"
          aria-label="The fan as a table"
          tabIndex={0}
        >
          <table className="table" data-dense="">
            <thead>
              <tr>
                <th scope="col" className="num">
                  Azimuth<span className="unit">°</span>
                </th>
                <th scope="col" className="num">
                  First land<span className="unit">km</span>
                </th>
                <th scope="col">Where</th>
                <th scope="col" className="num">
                  Listed people
                </th>
                <th scope="col" className="num">
                  Spread people
                </th>
                <th scope="col" className="num">
                  Settlements in the exclusion zone
                </th>
              </tr>
            </thead>
            <tbody>
              {fan.spokes.map((one) => (
                <tr key={one.azimuthDeg} aria-current={one.azimuthDeg === spoke?.azimuthDeg || undefined}>
                  <th scope="row" className="num">
                    {one.azimuthDeg}
                  </th>
                  <td className="num">
                    {one.firstLandKm === null
                      ? clearKm(one) === 0
                        ? 'all land'
                        : 'none found'
                      : formatNumber(one.firstLandKm)}
                  </td>
                  <td>{one.firstLandName ?? '–'}</td>
                  <td className="num">{formatNumber(one.people)}</td>
                  <td className="num">{one.spreadPeople === null ? 'off' : roughly(one.spreadPeople)}</td>
                  <td className="num">{formatNumber(one.excludedSettlements)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </details>
    </Panel>
  );
}

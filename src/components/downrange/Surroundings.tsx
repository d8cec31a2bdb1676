import { Panel, TableScroll } from '#components/ui/index.ts';
import type { NearPlace, StudySurroundings } from '#contract/downrange.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { degrees, roughly } from './words.ts';

function Within({ within }: Pick<StudySurroundings, 'within'>) {
  return (
    <TableScroll label="People about the site">
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col" className="num">
              Within<span className="unit">km</span>
            </th>
            <th scope="col" className="num">
              Listed settlements
            </th>
            <th scope="col" className="num">
              Their people
            </th>
            <th scope="col" className="num">
              Spread people<span className="unit">an assumption</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {within.map((ring) => (
            <tr key={ring.radiusKm}>
              <th scope="row" className="num">
                {formatNumber(ring.radiusKm)}
              </th>
              <td className="num">
                {formatNumber(ring.settlements)}
                {ring.settlementsWithoutFigure > 0 && (
                  <span className="sub">{formatNumber(ring.settlementsWithoutFigure)} without a figure</span>
                )}
              </td>
              <td className="num">{formatNumber(ring.people)}</td>
              <td className="num">
                {ring.spreadPeople === null ? 'off' : roughly(ring.spreadPeople)}
                {ring.unknownPeopleLandKm2 !== null && ring.unknownPeopleLandKm2 >= 0.5 && (
                  <span className="sub">unknown on {formatNumber(ring.unknownPeopleLandKm2)} km²</span>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

const whereIs = ({ distanceKm, azimuthDeg }: Pick<NearPlace, 'distanceKm' | 'azimuthDeg'>): string =>
  `${formatNumber(distanceKm, 1)} km at ${degrees(Math.round(azimuthDeg) % 360)}`;

function Nearest({ nearest }: Pick<StudySurroundings, 'nearest'>) {
  return (
    <TableScroll label="Nearest settlements by size">
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col" className="num">
              People, at least
            </th>
            <th scope="col">Nearest settlement</th>
            <th scope="col" className="num">
              People
            </th>
            <th scope="col" className="num">
              Distance and azimuth
            </th>
          </tr>
        </thead>
        <tbody>
          {nearest.map(({ leastPeople, place }) => (
            <tr key={leastPeople}>
              <th scope="row" className="num">
                {formatNumber(leastPeople)}
              </th>
              <td>{place ? `${place.name} (${place.countryCode})` : 'none listed'}</td>
              <td className="num">{place ? formatNumber(place.people) : '–'}</td>
              <td className="num">{place ? whereIs(place) : '–'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

function OtherSites({
  sites,
  onSite,
}: {
  sites: StudySurroundings['otherSites'];
  onSite: (code: string) => void;
}) {
  if (sites.length === 0) return null;
  return (
    <details className="chart-as-table">
      <summary>Distance to the study’s other sites</summary>
      <div className="table-scroll downrange-long" role="region" aria-label="Other sites" tabIndex={0}>
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Site</th>
              <th scope="col" className="num">
                Distance and azimuth
              </th>
            </tr>
          </thead>
          <tbody>
            {sites.map((other) => (
              <tr key={other.siteId}>
                <th scope="row">
                  <button type="button" className="underline" onClick={() => onSite(other.code)}>
                    {other.name}
                  </button>
                </th>
                <td className="num">{whereIs(other)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

interface SurroundingsProps {
  site: InputSite;
  answer: StudySurroundings;
  onSite: (code: string) => void;
}

/** Who lives about a site, its coast, and the study's other sites. */
export function Surroundings({ site, answer, onSite }: SurroundingsProps) {
  const { coast, onLand, within, nearest, otherSites } = answer;
  const side = onLand ? 'on land' : 'in the sea by the data: its coast is drawn to 200 to 400 m';
  return (
    <Panel
      title={`Around ${site.name}`}
      caption={`${coast ? `The nearest coast is ${formatNumber(coast.distanceKm, 1)} km away; the pad lies ${side}.` : `The pad lies ${side}.`} Distances on the ellipsoid; a settlement is one point.`}
    >
      <div className="downrange-around">
        <Within within={within} />
        <Nearest nearest={nearest} />
      </div>
      <OtherSites sites={otherSites} onSite={onSite} />
    </Panel>
  );
}

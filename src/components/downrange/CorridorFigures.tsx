import { ButtonLink, Panel } from '#components/ui/index.ts';
import type { StudyCorridor } from '#contract/downrange.ts';
import { formatCount, formatFull, formatNumber } from '#contract/format.ts';
import { VERIFY_CASUALTY_AREAS } from '#core/downrange/casualty.ts';
import { CLASS_NAMES } from './launch.ts';
import { degrees, formatPower, km, roughly, zoneFinding } from './words.ts';

type Corridor = StudyCorridor['corridor']['features'][1]['properties'];

function Line({ name, children, note }: { name: string; children: React.ReactNode; note?: React.ReactNode }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>
        {children}
        {note && <small>{note}</small>}
      </dd>
    </div>
  );
}

function FirstLand({ coastKm, firstLandKm, firstLandName, rangeNm }: Corridor) {
  if (coastKm === null) return <>the flight line never leaves land</>;
  if (firstLandKm === null) return <>none found within {km(rangeNm * 1.852)}</>;
  return (
    <>
      <span className="num" title={formatFull(firstLandKm)}>
        {formatNumber(firstLandKm, 1)} km
      </span>
      {firstLandName && `, ${firstLandName}`}
    </>
  );
}

function SpreadPeople({ spreadPeople, unknownPeopleLandKm2 }: Corridor) {
  if (spreadPeople === null)
    return <Line name="People spread over the rest of the land">not counted: switched off</Line>;
  const unknown =
    unknownPeopleLandKm2 !== null && unknownPeopleLandKm2 >= 0.5
      ? ` ${formatNumber(unknownPeopleLandKm2)} km² belong to countries without a known total: their people beyond the settlements are unknown.`
      : '';
  return (
    <Line
      name="People spread over the rest of the land"
      note={`An assumption: each country’s people beyond its listed settlements, spread evenly.${unknown}`}
    >
      <span className="num" title={formatFull(spreadPeople)}>
        about {roughly(spreadPeople)}
      </span>
    </Line>
  );
}

/** Casualties expected, with every figure that they were worked out from. */
function Expectation({ corridor, densityPerKm2 }: { corridor: Corridor; densityPerKm2: number }) {
  const { casualtyExpectation: found, vehicleClass } = corridor;
  const areas = found.casualtyAreasMi2.map((area) => formatFull(Number(area.toPrecision(6)))).join(', ');
  const parts = [
    `listed settlements ${formatPower(found.settlements)}`,
    ...(found.spreadPeople === null ? [] : [`spread people ${formatPower(found.spreadPeople)}`]),
  ];
  return (
    <Line
      name="Casualty expectation, indicative"
      note={
        <>
          {parts.join(', ')}
          {found.greatest &&
            `; the greatest part is ${found.greatest.name}’s, ${formatPower(found.greatest.expectation)}`}
          . By the formula of 14 CFR part 420, appendix C, with: probability of failure{' '}
          {formatNumber(found.failureProbability, 2)} as prescribed, not the vehicle’s; impact rates of table
          C-2; a settlement’s area its people over {formatNumber(densityPerKm2)} per km²; effective casualty
          areas {areas} mi² for {CLASS_NAMES[vehicleClass].toLowerCase()}:{' '}
          <b>
            {found.casualtyAreasNote}
            {found.casualtyAreasNote.includes(VERIFY_CASUALTY_AREAS) ? '' : `; ${VERIFY_CASUALTY_AREAS}`}
          </b>
          . 14 CFR 420.25 compares with {formatPower(found.compareWith)}; being below it is no finding of the
          regulator’s.
        </>
      }
    >
      <span className="num" title={formatFull(found.total)}>
        {found.complete ? '' : 'at least '}
        {formatPower(found.total)}
      </span>{' '}
      a launch{found.complete ? '' : ': some people are unknown'}
    </Line>
  );
}

interface CorridorFiguresProps {
  answer: StudyCorridor;
  densityPerKm2: number;
  file: string;
}

/** One corridor's figures, beside the map. */
export function CorridorFigures({ answer, densityPerKm2, file }: CorridorFiguresProps) {
  const [{ properties: zone }, { properties: corridor }] = answer.corridor.features;
  const { lands, landKm2, coastKm, settlementsWithoutFigure } = corridor;
  return (
    <Panel
      title={`Corridor at ${degrees(corridor.azimuthDeg)}`}
      caption={`${CLASS_NAMES[corridor.vehicleClass]} class, out to ${km(corridor.rangeNm * 1.852)}, a straight ground track by ${answer.corridor.regulation}.`}
    >
      <dl className="downrange-figures">
        <Line name="Overflight exclusion zone" note={zoneFinding(zone)}>
          <span className="num" title={formatFull(zone.areaKm2)}>
            {formatNumber(zone.areaKm2, 1)} km²
          </span>
        </Line>
        <Line name="First land downrange, along the flight line">
          <FirstLand {...corridor} />
        </Line>
        <Line name="Open water, along the flight line">
          {coastKm === null ? (
            'none within the range'
          ) : (
            <span className="num" title={formatFull(coastKm)}>
              after {formatNumber(coastKm, 1)} km
            </span>
          )}
        </Line>
        <Line
          name="Land in the corridor"
          note={lands
            .slice(0, 6)
            .map((land) => `${land.name} ${formatNumber(land.landKm2)}`)
            .join(', ')
            .concat(
              lands.length > 6
                ? ` and ${formatCount(lands.length - 6, 'more country', 'more countries')}`
                : '',
            )}
        >
          <span className="num" title={formatFull(landKm2)}>
            {formatNumber(landKm2)} km²
          </span>{' '}
          of {formatCount(lands.length, 'country', 'countries')}
        </Line>
        <Line
          name="Listed settlements in the corridor"
          note={
            settlementsWithoutFigure > 0 &&
            `${formatNumber(settlementsWithoutFigure)} of them without a figure: their people are unknown, not none.`
          }
        >
          <span className="num">{formatNumber(corridor.settlements)}</span> with{' '}
          <span className="num" data-people>
            {formatNumber(corridor.people)}
          </span>{' '}
          people
        </Line>
        <SpreadPeople {...corridor} />
        <Expectation corridor={corridor} densityPerKm2={densityPerKm2} />
      </dl>
      <p className="mt-4">
        <ButtonLink href={file} icon="export" download>
          Corridor as GeoJSON
        </ButtonLink>
      </p>
      <Overland corridor={corridor} />
    </Panel>
  );
}

/** Where the flight line itself runs over land. */
function Overland({ corridor: { overland } }: { corridor: Corridor }) {
  if (overland.length === 0) return null;
  const length = overland.reduce((sum, { fromKm, toKm }) => sum + toKm - fromKm, 0);
  return (
    <details className="chart-as-table">
      <summary>
        Flight line over land: {formatCount(overland.length, 'stretch', 'stretches')}, {km(length)}
      </summary>
      <div className="table-scroll downrange-long">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Country</th>
              <th scope="col" className="num">
                From<span className="unit">km</span>
              </th>
              <th scope="col" className="num">
                To<span className="unit">km</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {overland.map(({ fromKm, toKm, name }) => (
              <tr key={fromKm}>
                <th scope="row">{name}</th>
                <td className="num">{formatNumber(fromKm, 1)}</td>
                <td className="num">{formatNumber(toKm, 1)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

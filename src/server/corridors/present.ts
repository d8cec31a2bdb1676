import type { CorridorInput, CorridorOutput } from '#contract/corridor.ts';
import {
  EXPECTATION_LIMIT,
  FAILURE_PROBABILITY,
  NAUTICAL_MILE,
  REGULATION,
  REMEMBERED_CASUALTY_AREAS,
  VERIFY_CASUALTY_AREAS,
  attributions,
  cautions,
  corridorOf,
  surveyCorridor,
  type AreaSurvey,
  type CasualtyAreas,
  type Corridor,
  type CorridorSurvey,
  type Position,
  type World,
} from '#core/downrange/index.ts';
import { exclusionArea } from '#core/downrange/shape.ts';
import { metres } from '#core/units.ts';

type Zone = CorridorOutput['features'][0];
type Whole = CorridorOutput['features'][1];
type Expectation = Whole['properties']['casualtyExpectation'];
type AreaProperties = Omit<Zone['properties'], 'kind' | 'areaKm2' | 'firstLandKm'>;

const SQUARE_MILE = 1609.344 ** 2;
const km = (length: number): number => length / 1000;
const km2 = (area: number): number => area / 1e6;
/** Positions to 0.0000001°, 1 cm. */
const rounded = (degrees: number): number => Math.round(degrees * 1e7) / 1e7;

/** RFC 7946, section 3.1.6: closed, counterclockwise; section 3.1.9: cut at the antimeridian into several. */
function geometryOf(rings: readonly (readonly Position[])[]): Zone['geometry'] {
  const closed = rings.map((ring) => {
    const positions = ring.map(([longitude, latitude]) => [rounded(longitude), rounded(latitude)]);
    return [...positions, positions[0] as number[]];
  });
  const [only] = closed;
  return only && closed.length === 1
    ? { type: 'Polygon', coordinates: [only] }
    : { type: 'MultiPolygon', coordinates: closed.map((ring) => [ring]) };
}

function areaProperties({ map }: World, survey: AreaSurvey): AreaProperties {
  const { lands, settlements, people, withoutFigure, spread } = survey;
  return {
    landKm2: km2(lands.reduce((sum, { area }) => sum + area, 0)),
    lands: lands.map(({ country, area }) => {
      const { code, name } = map.country(country);
      return { code, name, landKm2: km2(area) };
    }),
    settlements: settlements.length,
    settlementsWithoutFigure: withoutFigure,
    people,
    spreadPeople: spread && spread.people,
    unknownPeopleLandKm2: spread && km2(spread.unknownLand),
  };
}

const LARGEST = 20;

function largestSettlements({ settlements }: World, { strip }: Corridor, inside: readonly number[]) {
  const { names } = settlements.data;
  return [...inside]
    .sort((a, b) => settlements.people(b) - settlements.people(a) || a - b)
    .slice(0, LARGEST)
    .map((at) => {
      const place = settlements.place(at);
      const { s, y } = strip.exact(place);
      return {
        name: names[at] ?? '',
        countryCode: settlements.countryCode(at),
        people: settlements.people(at),
        ...place,
        downrangeKm: km(s),
        crossrangeKm: km(y),
      };
    });
}

function expectationOf(
  { settlements }: World,
  { listed, spread, complete, greatest }: CorridorSurvey['expectation'],
  input: CorridorInput,
): Expectation {
  return {
    settlements: listed,
    spreadPeople: spread,
    total: listed + (spread ?? 0),
    complete,
    greatest: greatest && {
      name: settlements.data.names[greatest.settlement] ?? '',
      expectation: greatest.expectation,
    },
    compareWith: EXPECTATION_LIMIT,
    failureProbability: FAILURE_PROBABILITY,
    casualtyAreasMi2: casualtyAreasOf(input).map((area) => area / SQUARE_MILE),
    casualtyAreasNote: input.settings.casualtyAreasMi2
      ? 'As given with the request'
      : `Table C-3 as remembered: ${VERIFY_CASUALTY_AREAS}`,
  };
}

/** The areas asked for, or the class's as remembered, m². */
function casualtyAreasOf({ settings, vehicleClass }: CorridorInput): CasualtyAreas {
  const [near, middle, far] = settings.casualtyAreasMi2 ?? [];
  if (near === undefined || middle === undefined || far === undefined)
    return REMEMBERED_CASUALTY_AREAS[vehicleClass];
  return [near * SQUARE_MILE, middle * SQUARE_MILE, far * SQUARE_MILE];
}

function zoneFeature(
  world: World,
  { shape }: Corridor,
  { exclusion, first: { land } }: CorridorSurvey,
): Zone {
  const length = shape.exclusionLength + shape.circleRadius;
  return {
    type: 'Feature',
    geometry: geometryOf(exclusion.rings),
    properties: {
      kind: 'exclusion-zone',
      areaKm2: km2(exclusionArea(shape)),
      ...areaProperties(world, exclusion),
      firstLandKm: land && land.distance <= length ? km(land.distance) : null,
    },
  };
}

function corridorFeature(
  world: World,
  corridor: Corridor,
  survey: CorridorSurvey,
  input: CorridorInput,
): Whole {
  const { coast, land } = survey.first;
  const { azimuthDeg, vehicleClass, rangeNm } = input;
  return {
    type: 'Feature',
    geometry: geometryOf(survey.corridor.rings),
    properties: {
      kind: 'corridor',
      azimuthDeg,
      vehicleClass,
      rangeNm,
      ...areaProperties(world, survey.corridor),
      firstLandKm: land && km(land.distance),
      firstLandName: land && world.map.country(land.country).name,
      coastKm: coast === null ? null : km(coast),
      overland: survey.stretches.map(({ from, to, country }) => {
        const { code, name } = world.map.country(country);
        return { fromKm: km(from), toKm: km(to), code, name };
      }),
      largestSettlements: largestSettlements(world, corridor, survey.corridor.settlements),
      casualtyExpectation: expectationOf(world, survey.expectation, input),
    },
  };
}

/** One corridor surveyed, as GeoJSON. @throws RangeError as corridorOf */
export function corridorCollection(world: World, input: CorridorInput): CorridorOutput {
  const { azimuthDeg, vehicleClass, rangeNm, settings, ...start } = input;
  const corridor = corridorOf(start, azimuthDeg, vehicleClass, metres(rangeNm * NAUTICAL_MILE));
  const survey = surveyCorridor(world, corridor, {
    placeDensity: settings.placeDensityPerKm2 / 1e6,
    spreads: settings.spreadPeople,
    casualtyAreas: casualtyAreasOf(input),
  });
  return {
    type: 'FeatureCollection',
    features: [zoneFeature(world, corridor, survey), corridorFeature(world, corridor, survey, input)],
    regulation: REGULATION,
    cautions: [...cautions],
    attributions: attributions.map(({ what, source, licence }) => `${what}: ${source}, ${licence}`),
  };
}

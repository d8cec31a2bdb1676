import {
  MOST_SETTLEMENTS,
  type SettlementInside,
  type StudyCorridor,
  type StudyFan,
} from '#contract/downrange.ts';
import {
  NAUTICAL_MILE,
  REGULATION,
  attributions,
  azimuthFan,
  cautions,
  corridorOf,
  type Spoke,
  type World,
} from '#core/downrange/index.ts';
import { fromKilometres, metres } from '#core/units.ts';
import { corridorCollection } from '#server/corridors/present.ts';
import { answerSurroundings } from './surroundings.ts';
import type { DownrangeAnswers, DownrangeTask } from './tasks.ts';

/** What stands beside every figure. */
export const caveats = () => ({
  regulation: REGULATION,
  cautions: [...cautions],
  attributions: attributions.map(({ what, source, licence }) => `${what}: ${source}, ${licence}`),
});

const perSquareMetre = (densityPerKm2: number | null): number | null =>
  densityPerKm2 === null ? null : densityPerKm2 / 1e6;

const spokeOf = ({ map }: World, spoke: Spoke): StudyFan['spokes'][number] => ({
  azimuthDeg: spoke.azimuthDeg,
  coastKm: spoke.first.coast === null ? null : spoke.first.coast / 1000,
  firstLandKm: spoke.first.land && spoke.first.land.distance / 1000,
  firstLandName: spoke.first.land && map.country(spoke.first.land.country).name,
  people: spoke.people,
  settlements: spoke.settlements,
  settlementsWithoutFigure: spoke.withoutFigure,
  spreadPeople: spoke.spread && spoke.spread.people,
  unknownPeopleLandKm2: spoke.spread && spoke.spread.unknownLand / 1e6,
  excludedPeople: spoke.excludedPeople,
  excludedSettlements: spoke.excludedSettlements,
});

function answerFan(world: World, task: DownrangeTask & { kind: 'fan' }): StudyFan {
  const { siteId, start, vehicleClass, rangeKm, placeDensityPerKm2 } = task;
  const density = perSquareMetre(placeDensityPerKm2);
  const fan = azimuthFan(world, start, vehicleClass, fromKilometres(rangeKm), density);
  return { siteId, vehicleClass, rangeKm, spokes: fan.map((spoke) => spokeOf(world, spoke)), ...caveats() };
}

function answerCorridor(
  world: World,
  { siteId, input }: DownrangeTask & { kind: 'corridor' },
): StudyCorridor {
  const { azimuthDeg, vehicleClass, rangeNm, latitudeDeg, longitudeDeg } = input;
  const start = { latitudeDeg, longitudeDeg };
  const corridor = corridorOf(start, azimuthDeg, vehicleClass, metres(rangeNm * NAUTICAL_MILE));
  const { settlements } = world;
  const inside = settlements.inside(corridor);
  const excluded = new Set(settlements.excluded(corridor, inside));
  const listed = [...inside]
    .sort((a, b) => settlements.people(b) - settlements.people(a) || a - b)
    .slice(0, MOST_SETTLEMENTS)
    .map((at): SettlementInside => {
      const place = settlements.place(at);
      const { s, y } = corridor.strip.exact(place);
      return {
        name: settlements.data.names[at] ?? '',
        countryCode: settlements.countryCode(at),
        people: settlements.people(at),
        ...place,
        downrangeKm: s / 1000,
        crossrangeKm: y / 1000,
        excluded: excluded.has(at),
      };
    });
  return { siteId, corridor: corridorCollection(world, input), settlements: listed, total: inside.length };
}

/** Works out what the Downrange section asks. @throws RangeError as corridorOf */
export function answerDownrange(world: World, task: DownrangeTask): DownrangeAnswers[DownrangeTask['kind']] {
  switch (task.kind) {
    case 'fan':
      return answerFan(world, task);
    case 'corridor':
      return answerCorridor(world, task);
    case 'surroundings':
      return { ...answerSurroundings(world, task, perSquareMetre(task.placeDensityPerKm2)), ...caveats() };
  }
}

import type { TrajectoryPoint } from '#contract/ascent.ts';
import { formatNumber } from '#contract/format.ts';
import type { VehicleInput } from '#contract/vehicle.ts';

/** Something that happens in a flight. */
export interface FlightEvent {
  timeS: number;
  words: string;
}

interface Part {
  words: string;
  kg: number;
}

/** What a vehicle leaves behind on its way, by the words that a chart says it in. */
function partsOf(vehicle: VehicleInput): Part[] {
  const { boosters, stages, fairingKg, fairingLeavesAfterStage } = vehicle;
  const parted = boosters && boosters.count > 0 ? boosters.count * boosters.dryKg : 0;
  const byStage = stages.flatMap(({ dryKg }, at): Part[] => {
    const parts = `stage ${at + 1} parts`;
    const both = { words: `${parts}, fairing leaves`, kg: dryKg + fairingKg };
    return fairingKg > 0 && fairingLeavesAfterStage === at + 1
      ? [both, { words: parts, kg: dryKg }]
      : [{ words: parts, kg: dryKg }];
  });
  return [
    ...(parted > 0 ? [{ words: 'boosters part', kg: parted }] : []),
    ...byStage,
    ...(fairingKg > 0 ? [{ words: 'fairing leaves', kg: fairingKg }] : []),
  ];
}

/** A clock's rounding: moments this close are one. */
const SAME_S = 1e-6;

/** Two points at one moment are the same place before and after a part was left behind. */
function droppedAt(points: readonly TrajectoryPoint[], index: number): number {
  const [before, now] = [points[index - 1], points[index]];
  return before && now && Math.abs(now.timeS - before.timeS) < SAME_S ? before.massKg - now.massKg : 0;
}

const NEAR_KG = 0.01;

/** Seconds over which an engine that is off counts as a coast. */
const COAST_S = 1;

const coasts = (from: TrajectoryPoint | undefined, to: TrajectoryPoint | undefined): boolean =>
  from !== undefined && to !== undefined && to.massKg === from.massKg && to.timeS > from.timeS + COAST_S;

function drops(points: readonly TrajectoryPoint[], vehicle: VehicleInput | null): FlightEvent[] {
  const parts = vehicle ? partsOf(vehicle) : [];
  return points.flatMap(({ timeS }, index): FlightEvent[] => {
    const kg = droppedAt(points, index);
    if (kg < NEAR_KG) return [];
    const part = parts.find((one) => Math.abs(one.kg - kg) < NEAR_KG);
    return [{ timeS, words: part?.words ?? `${formatNumber(kg)} kg left behind` }];
  });
}

function burns(points: readonly TrajectoryPoint[]): FlightEvent[] {
  return points.flatMap((point, index): FlightEvent[] => {
    const before = coasts(points[index - 1], point);
    const after = coasts(point, points[index + 1]);
    if (after && !before) return [{ timeS: point.timeS, words: 'engine off' }];
    return before && !after && index < points.length - 1
      ? [{ timeS: point.timeS, words: 'engine on again' }]
      : [];
  });
}

/**
 * What happens in a flight, in its order: the greatest dynamic pressure, what is left behind (named where the mass is
 * one of the vehicle's parts), engines off and on again, and the end of the last burn.
 */
export function eventsOf(points: readonly TrajectoryPoint[], vehicle: VehicleInput | null): FlightEvent[] {
  const last = points.at(-1);
  if (!last) return [];
  const most = points.reduce((top, point) => (point.dynamicPressurePa > top.dynamicPressurePa ? point : top));
  return [
    ...(most.dynamicPressurePa > 0 ? [{ timeS: most.timeS, words: 'greatest pressure' }] : []),
    ...drops(points, vehicle),
    ...burns(points),
    { timeS: last.timeS, words: 'injection' },
  ].sort((a, b) => a.timeS - b.timeS);
}

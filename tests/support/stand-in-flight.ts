import type { AscentOutcome, AscentTask } from '#contract/ascent-job.ts';

const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

/** Stands in for the solver in tests of the queue: takes a moment, and answers by the inputs alone. */
export async function standInFlight({ site, orbit }: AscentTask, tookMs = 0): Promise<AscentOutcome> {
  await pause(tookMs);
  return {
    converged: true,
    reason: null,
    payloadKg: 1_000 - 4 * Math.abs(site.latitudeDeg) - orbit.perigeeKm / 100,
    flownInclinationDeg: orbit.inclinationDeg ?? 98,
    burnOutS: 500,
    launchHeadingDeg: 90,
    maxDynamicPressurePa: 40_000,
    idealDeltaVMps: 9_000,
    relativeSpeedMps: 7_400,
    centrifugalMps: 10,
    lossesMps: { gravity: 1_200, drag: 80, steering: 40, backPressure: 120 },
    remainderMps: 5,
    trajectory: [
      {
        timeS: 0,
        latitudeDeg: site.latitudeDeg,
        longitudeDeg: site.longitudeDeg,
        altitudeM: 0,
        relativeSpeedMps: 0,
        flightPathDeg: 90,
        headingDeg: 90,
        massKg: 11_100,
        dynamicPressurePa: 0,
        accelerationMps2: 15,
        impact: { kind: 'impact', latitudeDeg: site.latitudeDeg, longitudeDeg: site.longitudeDeg, timeS: 0 },
      },
    ],
  };
}

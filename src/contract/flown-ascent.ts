import { AscentFlyer } from '#core/flight/ascent/fly-ascent.ts';
import type { Ascent } from '#core/flight/ascent/fly-ascent.ts';
import { EARTH } from '#core/flight/ascent/planet.ts';
import { padOf, targetOf } from '#core/flight/index.ts';
import type { AscentInput, AscentOutput } from './ascent.ts';
import { presentNoAscent, presentTrajectory } from './from-ascent.ts';
import { toAscentVehicle } from './to-ascent.ts';
import { toOrbit, toSite } from './to-core.ts';

const DEGREE = Math.PI / 180;
function present(flown: Ascent, site: AscentInput['site']): AscentOutput {
  if (flown.kind === 'not-flown') return presentNoAscent(flown.reason);
  const { account, payload } = flown;
  const { gravity, drag, steering, backPressure } = account.losses;
  return {
    converged: true,
    reason: null,
    payloadKg: payload,
    flownInclinationDeg: account.inclination / DEGREE,
    burnOutS: account.burnOut,
    launchHeadingDeg: account.heading / DEGREE,
    maxDynamicPressurePa: account.trajectory.greatestPressure(),
    idealDeltaVMps: account.ideal,
    relativeSpeedMps: account.relativeSpeed,
    centrifugalMps: account.centrifugal,
    lossesMps: { gravity, drag, steering, backPressure },
    remainderMps: account.remainder,
    trajectory: presentTrajectory(account.trajectory, site.longitudeDeg, EARTH),
  };
}

/** One ascent as it crosses the wire; the same inputs give the same figures, whatever was flown before. */
export function flyAscent({ site, orbit, vehicle, settings }: AscentInput): AscentOutput {
  const flyer = new AscentFlyer(toAscentVehicle(vehicle), {
    turnSpeedFraction: settings.turnSpeedFraction,
    headingSpeed: settings.headingSpeedMps,
  });
  return present(flyer.fly(padOf(toSite(site)), targetOf(toOrbit(orbit))), site);
}

/** An ascent as JSON text in bytes. */
export function ascentBytes(input: AscentInput): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(flyAscent(input)));
}

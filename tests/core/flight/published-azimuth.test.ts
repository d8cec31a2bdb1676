import { describe, expect, test } from 'vitest';
import { constants } from '#core/constants.ts';
import { meridianOf } from '#core/flight/earth.ts';
import { inclinationFlown, inertialAzimuths, launchVector } from '#core/flight/launch-azimuth.ts';
import { circularSpeed, radiusOf } from '#core/flight/orbit.ts';
import { fromDegrees, fromKilometres, metres, metresPerSecond, toDegrees } from '#core/units.ts';
import { reference } from '#tests/support/reference.ts';
import type { ReferenceRow } from '#tests/support/reference.ts';

type Row = ReferenceRow<'azimuth'>;

const latitude = (row: Row) => fromDegrees(Number(row.latitude_deg));
const injectionSpeed = (row: Row) => circularSpeed(radiusOf(fromKilometres(Number(row.altitude_km))));

/** The rows hand their angle straight to the azimuth formula and take the ellipsoid's speed at the same number. */
const siteSpeed = (row: Row) => meridianOf(latitude(row), metres(0)).rotationSpeed;

function inertial(row: Row) {
  const answers = inertialAzimuths(latitude(row), fromDegrees(Number(row.inclination_deg)));
  const answer = row.branch === 'southerly' ? answers.at(-1) : answers[0];
  if (answer === undefined) throw new Error(`${row.id}: out of reach`);
  return answer;
}

const launch = (row: Row, rotation = siteSpeed(row)) =>
  launchVector(inertial(row), injectionSpeed(row), rotation);

function onASphere(row: Row): number {
  const { equatorialRadius, rotationRate } = constants;
  const speed = rotationRate.value * equatorialRadius.value * Math.cos(latitude(row));
  return launch(row, metresPerSecond(speed)).requiredSpeed;
}

const quantities: Record<string, (row: Row) => number> = {
  'inertial azimuth': (row) => toDegrees(inertial(row)),
  'launch azimuth': (row) => toDegrees(launch(row).launchAzimuth),
  'required speed': (row) => launch(row).requiredSpeed,
  'required speed on a sphere': onASphere,
  'rotation correction': (row) => toDegrees(launch(row).launchAzimuth) - toDegrees(inertial(row)),
  'rotation loss': (row) => launch(row).requiredSpeed - injectionSpeed(row),
  'difference of required speeds': (row) =>
    launch(row).requiredSpeed - launch({ ...row, latitude_deg: '45.6' }).requiredSpeed,
  'inclination flown': (row) =>
    toDegrees(inclinationFlown(latitude(row), fromDegrees(Number(row.azimuth_deg)))),
};

describe('launch azimuth and inclination', () => {
  test.each(reference('azimuth'))('$id $quantity', (row) => {
    expect(quantities[row.quantity]?.(row) ?? NaN).toBeWithin(row.expected, row.tolerance);
  });
});

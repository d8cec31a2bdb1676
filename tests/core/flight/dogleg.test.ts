import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { bestDogleg, speedShare } from '#core/flight/dogleg.ts';
import { fromDegrees, toDegrees } from '#core/units.ts';
import { inclinationDeg, latitudeDeg, SEED } from '#tests/support/flights.ts';
import { turnAt, turnCost } from '#tests/support/plain-flight.ts';
import { scan } from '#tests/support/scan.ts';

const ARC = fromDegrees(15);

/** The leg flown at an inertial azimuth from a geocentric latitude. */
function legOf(latitude: number, beta: number) {
  const along = Math.cos(latitude) * Math.cos(beta);
  return {
    cos: Math.cos(latitude) * Math.sin(beta),
    sin: Math.hypot(Math.sin(latitude), along),
    start: Math.atan2(Math.sin(latitude), along),
  };
}

const planeOf = (inclination: number) => ({
  cos: inclination === Math.PI / 2 ? 0 : Math.cos(inclination),
  sin: inclination === Math.PI ? 0 : Math.sin(inclination),
});

const azimuthDeg = fc.double({ min: 0, max: 360, noNaN: true, maxExcluded: true });
const share = fc.oneof(fc.constant(0.6), fc.double({ min: 0, max: 1, noNaN: true }));

describe('the cheapest turn', () => {
  test('a fine scan of the arc finds none cheaper, and the one found is what it says', () => {
    fc.assert(
      fc.property(latitudeDeg, azimuthDeg, inclinationDeg, share, (phi, azimuth, i, k) => {
        const [latitude, beta, inclination] = [fromDegrees(phi), fromDegrees(azimuth), fromDegrees(i)];
        const found = bestDogleg(legOf(latitude, beta), planeOf(inclination), k);
        const scanned = scan((arc) => turnCost(latitude, beta, inclination, arc, k), 0, ARC);
        expect(found?.cost ?? Infinity).toBeLessThanOrEqual(scanned.value + 1e-9);
        if (found === undefined) return;
        expect(toDegrees(found.turn)).toBeLessThanOrEqual(60 + 2e-9);
        expect(found.cost).toBeWithin(2 * speedShare(k, found.arc) * Math.sin(found.turn / 2), 1e-9);
        // At a single point of the arc, or beside a pole, the formula itself has few digits left.
        const turn = turnAt(latitude, beta, inclination, found.arc);
        if (turn !== undefined && Math.abs(phi) < 89) expect(found.turn).toBeWithin(turn, 2e-7);
      }),
      { ...SEED, numRuns: 3000 },
    );
  }, 120_000);

  test('an equatorial orbit is turned into where the leg crosses the equator, and nowhere else', () => {
    const [latitude, beta] = [fromDegrees(5), fromDegrees(140)];
    const found = bestDogleg(legOf(latitude, beta), planeOf(0), 0.6);
    if (found === undefined) throw new Error('there is a turn');
    // Napier: tan θ = tan φ / −cos β along the leg, and the turn is the inclination flown.
    expect(Math.tan(found.arc)).toBeWithin(Math.tan(latitude) / -Math.cos(beta), 1e-12);
    expect(Math.cos(found.turn)).toBeWithin(Math.cos(latitude) * Math.sin(beta), 1e-12);
    expect(bestDogleg(legOf(latitude, fromDegrees(40)), planeOf(0), 0.6)).toBeUndefined();
  });

  test('a turn of 60° counts, one of more does not', () => {
    expect(bestDogleg(legOf(0, fromDegrees(90)), planeOf(fromDegrees(60)), 0.6)?.turn).toBeWithin(
      Math.PI / 3,
      1e-12,
    );
    expect(bestDogleg(legOf(0, fromDegrees(90)), planeOf(fromDegrees(60.001)), 0.6)).toBeUndefined();
  });

  test('the share of the speed holds to 7° of arc and rises to the whole at 15°', () => {
    expect(speedShare(0.6, fromDegrees(7))).toBe(0.6);
    expect(speedShare(0.6, fromDegrees(11))).toBeWithin(0.8, 1e-12);
    expect(speedShare(0.6, fromDegrees(15))).toBeWithin(1, 1e-12);
  });
});

import { describe, expect, test } from 'vitest';
import { carriedFor, flightsFromEquator } from '#components/requirement/payload-check.ts';
import { changesOf, draftOf, fieldsOf, readOrbit } from '#components/requirement/orbit-form.ts';
import { labelOf, leavesOf } from '#components/requirement/vehicle-differences.tsx';
import { outstanding, requirementFinding, sunSynchronousDeg } from '#components/requirement/words.ts';
import { fieldsOf as vehicleFields, readVehicle } from '#components/vehicle/fields.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import { LIBRARY_VEHICLES } from '#seed/library.ts';

const orbit: StudyOrbit = {
  id: '01900000-0000-7000-8000-000000000000',
  position: 2,
  code: 'SSO',
  name: 'Sun-synchronous',
  perigeeKm: 600,
  apogeeKm: 600,
  inclinationDeg: null,
  sunSynchronous: true,
  profile: 'auto',
  parkingKm: 185,
  flightsPerYear: 3,
  version: 4,
};

describe('an orbit’s form', () => {
  test('reads back what it shows, and nothing has changed', () => {
    const read = readOrbit(fieldsOf(orbit));
    expect(read.success && changesOf(orbit, read.data)).toEqual({});
  });

  test('an inclination left behind by the switch is not sent', () => {
    const read = readOrbit({ ...fieldsOf(orbit), inclinationDeg: 51.6 });
    expect(read.success && changesOf(orbit, read.data)).toEqual({});
    const inclined = readOrbit({ ...fieldsOf(orbit), sunSynchronous: false, inclinationDeg: 51.6 });
    expect(inclined.success && changesOf(orbit, inclined.data)).toEqual({
      sunSynchronous: false,
      inclinationDeg: 51.6,
    });
  });

  test('a removed orbit is put back under its code and in its place', () => {
    expect(draftOf(orbit)).toMatchObject({ code: 'SSO', position: 2, sunSynchronous: true, perigeeKm: 600 });
    expect(draftOf(orbit)).not.toHaveProperty('version');
  });

  // A public page on sun-synchronous orbits prints 98.208° for a = 7,083.1 km, and an encyclopaedia a largest circular
  // radius of 12,352 km [both read].
  test('shows the inclination that makes the altitudes sun-synchronous, or nothing', () => {
    const altitude = 7_083.1 - 6_378.137;
    expect(sunSynchronousDeg(altitude, altitude)).toBeCloseTo(98.208, 2);
    expect(sunSynchronousDeg(12_351 - 6_378, 12_351 - 6_378)).not.toBeNull();
    expect(sunSynchronousDeg(12_353 - 6_378, 12_353 - 6_378)).toBeNull();
    expect(sunSynchronousDeg('abc', 600)).toBeNull();
    expect(sunSynchronousDeg(700, 600)).toBeNull();
  });
});

describe('the sentence', () => {
  const vehicle = { vehicle: LIBRARY_VEHICLES[1]?.spec ?? null, libraryVehicleId: null, version: 1 };
  const none = { vehicle: null, libraryVehicleId: null, version: 0 };
  test('says what is asked for and what is missing', () => {
    expect(requirementFinding({ question: '', orbits: [orbit], vehicle })).toBe(
      '1 target orbit, 3 flights a year, flown by Rowan M.',
    );
    expect(requirementFinding({ question: '', orbits: [], vehicle: none })).toBe('No target orbits yet.');
    expect(outstanding({ question: 'Where from?', orbits: [orbit], vehicle })).toBeNull();
    expect(outstanding({ question: '', orbits: [], vehicle: none })).toMatch(/question.*manifest.*vehicle/);
  });
});

describe('a vehicle’s form', () => {
  test.each(LIBRARY_VEHICLES)('reads $name back whole, with what the form does not show', ({ spec }) => {
    const read = readVehicle(vehicleFields(spec), spec);
    expect(read.data).toEqual(spec);
    expect(read.data).toHaveProperty('ascent');
  });

  test('drops the boosters with the switch', () => {
    const rowan = LIBRARY_VEHICLES[1]?.spec ?? null;
    const read = readVehicle({ ...vehicleFields(rowan), hasBoosters: false }, rowan);
    expect(read.data?.boosters).toBeUndefined();
  });

  test('a blank one names every figure it lacks', () => {
    const paths = readVehicle(vehicleFields(null), null).error?.issues.map(({ path }) => path.join('.'));
    expect(paths).toContain('stages.1.thrustVacKn');
    expect(paths).toContain('lossesMps.gravity');
    expect(paths).not.toContain('boosters');
  });

  test('differences are told in words', () => {
    const leaves = leavesOf(LIBRARY_VEHICLES[0]?.spec);
    expect(leaves.get('stages.0.propellantKg')).toBe('8,200');
    expect(labelOf('stages.0.propellantKg')).toBe('Stage 1: Propellant, kg');
    expect(labelOf('lossesMps.drag')).toBe('Drag loss, m/s');
  });
});

describe('the payload check', () => {
  // The rocket equation solved by hand for one stage and no fairing [derived]: with R = exp(Δv/(g₀ I)),
  // payload = (propellant − dry (R − 1)) / (R − 1).
  test('one stage carries what the rocket equation gives', () => {
    const vehicle = VehicleInput.parse({
      lossesMps: { gravity: 0, drag: 0, steering: 0 },
      stages: [{ dryKg: 500, propellantKg: 9_500, thrustVacKn: 200, ispVacS: 320 }],
    });
    const ratio = Math.exp(5_000 / (9.80665 * 320));
    const carried = carriedFor(vehicle, 5_000);
    expect(carried).toHaveProperty('payloadKg');
    expect('payloadKg' in carried && carried.payloadKg).toBeCloseTo(
      (9_500 - 500 * (ratio - 1)) / (ratio - 1),
      2,
    );
    const most = 9.80665 * 320 * Math.log(10_000 / 500);
    const short = carriedFor(vehicle, most + 12);
    expect('shortfallMps' in short && short.shortfallMps).toBeCloseTo(12, 6);
  });

  // Circular speed at 185 km less the equator's rotation, and the transfer to 200 km: μ and ω of WGS 84 [derived].
  test('200 km due east from the equator costs what vis-viva gives', () => {
    const vehicle = LIBRARY_VEHICLES[0]?.spec;
    if (!vehicle) throw new Error('no library vehicle');
    const { low, manifest } = flightsFromEquator(vehicle, [orbit], 0.6);
    const mu = 3.986004418e14;
    const [r1, r2] = [6_378_137 + 185_000, 6_378_137 + 200_000];
    const circular = (r: number) => Math.sqrt(mu / r);
    const onTransfer = (r: number) => Math.sqrt(mu * (2 / r - 2 / (r1 + r2)));
    const transfer = onTransfer(r1) - circular(r1) + (circular(r2) - onTransfer(r2));
    const required = circular(r1) - 7.292115e-5 * 6_378_137;
    expect(low?.deltaVMps.total).toBeCloseTo(required + 1320 + 185 + 15 + 40 + transfer, 3);
    expect(manifest).toHaveLength(1);
    expect(manifest[0]?.inclinationDeg).toBeCloseTo(97.8, 1);
  });
});

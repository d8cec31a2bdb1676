import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { expect, test } from 'vitest';
import { ASCENT_METHOD } from '#contract/ascent-job.ts';
import { StudyInputs } from '#contract/study-inputs.ts';
import { newId } from '#db/columns.ts';
import { pairTasks, vehicleHash } from '#server/ascents/input-hash.ts';
import { flownVehicle } from '#tests/support/flown-study.ts';

/** RFC 8785 by the general-purpose library, of the whole at once. */
const sha256 = (value: unknown): string =>
  createHash('sha256')
    .update(canonicalize(value) ?? '')
    .digest('hex');

test('the hash put together from parts is that of the whole’s canonical JSON', () => {
  const orbit = { perigeeKm: 500.1, apogeeKm: 600, profile: 'auto' as const, parkingKm: 185 };
  const named = { name: 'Station', flightsPerYear: 4 };
  const inputs = StudyInputs.parse({
    revision: 3,
    sites: [
      {
        siteId: newId(),
        code: 'A',
        name: 'Ärö',
        latitudeDeg: -7.5e-7,
        longitudeDeg: 180,
        permittedAzimuthsDeg: [[342, 95]],
      },
    ],
    orbits: [
      { orbitId: newId(), code: 'O1', ...named, ...orbit, inclinationDeg: 51.6 },
      { orbitId: newId(), code: 'O2', ...named, ...orbit, sunSynchronous: true },
    ],
    vehicle: flownVehicle,
    settings: { turnSpeedFraction: 0.6 },
  });
  const tasks = pairTasks(inputs, flownVehicle);
  expect(tasks).toHaveLength(2);
  for (const { hash, task } of tasks)
    expect(hash).toBe(sha256({ method: ASCENT_METHOD, ...task, vehicle: vehicleHash(flownVehicle) }));
  expect(tasks[0]?.task).toEqual({
    site: { latitudeDeg: -7.5e-7, longitudeDeg: 180, elevationM: 0, permittedAzimuthsDeg: [[342, 95]] },
    orbit: { ...orbit, inclinationDeg: 51.6 },
    settings: { turnSpeedFraction: 0.6, headingSpeedMps: 500 },
  });
  expect(tasks[1]?.task.orbit).toEqual({ ...orbit, sunSynchronous: true });
});

import { describe, expect, test } from 'vitest';
import { flySites } from '#components/sites/flights.ts';
import { countInWords, sitesFinding, textOf } from '#components/sites/finding.ts';
import type { Site } from '#contract/site.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';

const site = (code: string, name: string, latitudeDeg: number, sectors: [number, number][] = []): Site => ({
  id: code,
  code,
  name,
  latitudeDeg,
  longitudeDeg: 0,
  elevationM: 0,
  permittedAzimuthsDeg: sectors,
  notes: '',
  values: {},
  particulars: {},
  version: 1,
});

const inputs: StudyInputs = {
  revision: 1,
  sites: [],
  orbits: [
    {
      orbitId: '0190d0a0-0000-7000-8000-000000000000',
      code: 'S',
      name: 'Station supply',
      perigeeKm: 420,
      apogeeKm: 420,
      inclinationDeg: 51.6,
      profile: 'auto',
      parkingKm: 185,
      flightsPerYear: 4,
    },
  ],
  vehicle: null,
  settings: { turnSpeedFraction: 0.6 },
};
const found = (sites: Site[]) => sitesFinding(sites, sites.length, inputs.orbits, flySites(inputs, sites));

// Which sites fly 51.6° directly follows from the textbook rule: an azimuth exists where the latitude is no higher
// than the inclination (Vallado, Fundamentals of Astrodynamics, section 6.4.1 [from memory]).
describe('the finding of the Sites screen', () => {
  test('names the one site that flies every orbit without a turn', () => {
    const finding = found([site('A', 'Low Bank', 5), site('B', 'High Head', 60)]);
    expect(textOf(finding)).toBe('Two candidates. Low Bank flies every orbit without a turn.');
    expect(finding.leader).toBe('Low Bank');
    expect(finding.why).toBe('To Station supply at 51.6°: High Head owes a turn or a plane change.');
  });

  test('names nobody as leading where several do, or none', () => {
    expect(found([site('A', 'Low Bank', 5), site('C', 'South Bank', -5)])).toMatchObject({
      leader: null,
      after: 'Each flies every orbit without a turn.',
      why: '',
    });
    // Only due south is permitted: 51.6° is flown neither northerly nor southerly without a turn.
    expect(textOf(found([site('D', 'Shut', 5, [[170, 190]])]))).toContain('None flies');
  });

  test('counts in words to twelve, and without orbits says what to do', () => {
    expect(countInWords(1)).toBe('One candidate.');
    expect(countInWords(12)).toBe('Twelve candidates.');
    expect(countInWords(1240)).toBe('1,240 candidates.');
    expect(sitesFinding([], 0, [], new Map()).before).toBe('No sites yet.');
    expect(sitesFinding([site('A', 'Low Bank', 5)], 1, [], new Map()).why).toContain('Add target orbits');
  });
});

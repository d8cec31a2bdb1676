import { readFileSync } from 'node:fs';
import { geoDistance } from 'd3-geo';
import { describe, expect, test } from 'vitest';
import { readSites } from '#core/csv/read-sites.ts';
import { scenario } from '#seed/demo/scenario.ts';

const demo = scenario.studies[0].sites.map((site, i) => ({ id: `site-${i}`, ...site }));

function readSeed(file: string) {
  const read = readSites(readFileSync(new URL(`../../../seed/${file}`, import.meta.url)), { existing: demo });
  if (read.kind === 'refused') throw new Error(read.message);
  return read;
}

describe('the demo’s files, read beside the demo’s sites', () => {
  test('clean: every row stands as it is', () => {
    const { rows, counts } = readSeed('candidates-clean.csv');
    expect(counts).toEqual({ new: 10, duplicate: 0, refused: 0 });
    expect(rows.flatMap((row) => row.reasons)).toEqual([]);
  });

  test('with errors: 8 accepted, 1 changed, 3 refused, each with its line', () => {
    const { rows, columns } = readSeed('candidates-with-errors.csv');
    expect(columns.map(({ field, unit }) => [field, unit])).toEqual([
      ['name', null],
      ['code', null],
      ['latitudeDeg', null],
      ['longitudeDeg', null],
      ['elevationM', 'ft'],
      ['permittedAzimuthsDeg', null],
      ['notes', null],
    ]);
    const spoken = rows.filter((row) => row.reasons.length > 0);
    expect(rows.length - spoken.length).toBe(8);
    expect(spoken.map(({ line, outcome, reasons }) => [line, outcome, reasons[0]?.message])).toEqual([
      [5, 'refused', 'Latitude 97.2150 is outside −90 to 90.'],
      [7, 'new', 'Longitude 184.8600 brought into −180 to 180.'],
      [8, 'refused', 'Code ES is taken by Essery Bank. Give this row another code.'],
      [11, 'refused', 'Permitted azimuths 140–140: from and to are the same. Write 0–360 for all round.'],
    ]);
  });

  test('500 rows: all new', () => {
    expect(readSeed('candidates-500.csv').counts).toEqual({ new: 500, duplicate: 0, refused: 0 });
  });
});

describe('the demo’s scenario', () => {
  // Positions of launch sites to a tenth of a degree, from published lists [from memory].
  const LAUNCHING: readonly [latitudeDeg: number, longitudeDeg: number][] = [
    [28.5, -80.6],
    [34.7, -120.6],
    [5.2, -52.8],
    [-2.4, -44.4],
    [-5.9, -35.2],
    [-2.9, 40.2],
    [-39.3, 177.9],
    [69.3, 16.0],
    [-12.4, 136.8],
    [-20.0, 148.1],
    [9.0, 167.7],
    [37.0, -25.2],
    [46.9, -55.4],
    [67.9, 21.1],
  ];

  test('no site lies within 100 km of a launch site that exists', () => {
    for (const study of scenario.studies) {
      for (const site of study.sites) {
        for (const [latitude, longitude] of LAUNCHING) {
          const km = geoDistance([site.longitudeDeg, site.latitudeDeg], [longitude, latitude]) * 6371;
          expect(km, site.name).toBeGreaterThan(100);
        }
      }
    }
  });

  test('twelve sites from about 55° S to 70° N, five orbits, seven criteria, a role for everyone', () => {
    const [study] = scenario.studies;
    const latitudes = study.sites.map((site) => site.latitudeDeg);
    expect([study.sites.length, study.orbits.length, study.criteria.length]).toEqual([12, 5, 7]);
    expect([Math.round(Math.min(...latitudes)), Math.round(Math.max(...latitudes))]).toEqual([-55, 70]);
    expect(new Set(study.members.map(({ role }) => role))).toEqual(
      new Set(['lead', 'engineer', 'reviewer', 'reader']),
    );
    expect(Object.values(study.points).reduce((sum, points) => sum + points, 0)).toBe(100);
  });
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { padOf, targetOf } from '#core/flight/index.ts';
import { BRANCHES, chosenOf, PROFILES, WAY_KINDS, WayList } from '#core/flight/way-list.ts';
import type { WayRecord } from '#core/flight/way-list.ts';
import { listWays } from '#core/flight/ways.ts';
import { anyOrbit, anySettings, anySite, SEED } from '#tests/support/flights.ts';
import { plainWays } from '#tests/support/plain-flight.ts';
import type { PlainWay } from '#tests/support/plain-flight.ts';
import { scan } from '#tests/support/scan.ts';

/*
 * Core against the method written a second time from its formulas, with brute-force scans where core solves. The scan
 * finds a least only as finely as it looks, and misses turns that are possible at one point of the arc alone.
 */
const nameOf = (way: WayRecord) =>
  `${WAY_KINDS[way.kind]} ${BRANCHES[way.branch]} ${PROFILES[way.profile]} ${way.edge}`;
const plainName = (way: PlainWay) => `${way.way} ${way.branch} ${way.profile} ${way.edge}`;

function compare(way: WayRecord, plain: PlainWay): void {
  expect(way.requiredSpeed).toBeWithin(plain.required, 1e-6);
  expect(way.transfer).toBeWithin(plain.transfer, 1e-6);
  expect(Math.cos(way.launchAzimuth - plain.launchAzimuth)).toBeGreaterThan(1 - 1e-12);
  expect(way.planeChange).toBeWithin(plain.planeChange, 1e-7);
  expect(way.planeChangeCost).toBeWithin(plain.planeChangeCost, 2e-5);
  expect(way.doglegCost).toBeLessThanOrEqual(plain.dogleg + 1e-6);
  expect(way.doglegCost).toBeGreaterThanOrEqual(plain.dogleg - 1e-3);
}

test('every way is there, at the cost that brute force finds', () => {
  fc.assert(
    fc.property(anySite, anyOrbit, anySettings, (site, orbit, settings) => {
      const ways = new WayList();
      listWays(padOf(site), targetOf(orbit), settings, ways, true);
      const listed = new Map(Array.from({ length: ways.length }, (_, k) => [nameOf(ways.at(k)), ways.at(k)]));
      const plain = plainWays(site, orbit, settings, scan);
      for (const way of plain) {
        const mine = listed.get(plainName(way));
        if (mine === undefined) throw new Error(`${plainName(way)} is missing`);
        compare(mine, way);
      }
      const named = new Set(plain.map(plainName));
      const extra = [...listed.keys()].filter((name) => !named.has(name) && !name.startsWith('dogleg'));
      expect(extra).toEqual([]);
    }),
    { ...SEED, numRuns: 1500 },
  );
}, 120_000);

test('leaving out what cannot be taken does not change what is', () => {
  fc.assert(
    fc.property(anySite, anyOrbit, anySettings, (site, orbit, settings) => {
      const [all, some] = [new WayList(), new WayList()];
      const [pad, target] = [padOf(site), targetOf(orbit)];
      listWays(pad, target, settings, all, true);
      listWays(pad, target, settings, some, false);
      const [whole, part] = [chosenOf(all), chosenOf(some)];
      expect(part < 0).toBe(whole < 0);
      if (whole >= 0) expect(some.at(part)).toEqual(all.at(whole));
    }),
    { ...SEED, numRuns: 5000 },
  );
}, 60_000);

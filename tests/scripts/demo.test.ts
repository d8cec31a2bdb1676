import { expect, test } from 'vitest';
import { refuseHost, shouldSeed } from '#scripts/demo.ts';

const EMPTY = { isEmpty: true, hasDemo: false };
const DEMO = { isEmpty: false, hasDemo: true };
const OWN = { isEmpty: false, hasDemo: false };
const URL = 'postgres://db.example/spinward';

test.each([
  ['an empty private database', {}, EMPTY, true],
  ['an empty private database, refused', { SPINWARD_DEMO: false }, EMPTY, false],
  ['a private database in use', { SPINWARD_DEMO: true }, OWN, false],
  ['an empty database given', { DATABASE_URL: URL }, EMPTY, false],
  ['an empty database given, wanted', { DATABASE_URL: URL, SPINWARD_DEMO: true }, EMPTY, true],
])('the demo is seeded or not: %s', (_, settings, contents, seeded) => {
  expect(shouldSeed({ HOST: '127.0.0.1', ...settings }, contents)).toBe(seeded);
});

test.each([
  ['loopback with the demo', { HOST: '127.0.0.1' }, DEMO, false],
  ['another loopback address', { HOST: '127.0.1.1' }, DEMO, false],
  ['localhost', { HOST: 'localhost' }, DEMO, false],
  ['IPv6 loopback', { HOST: '::1' }, DEMO, false],
  ['every address with the demo', { HOST: '0.0.0.0' }, DEMO, true],
  ['every address, about to seed the demo', { HOST: '0.0.0.0' }, EMPTY, true],
  ['every address with the demo, refused too late', { HOST: '::', SPINWARD_DEMO: false }, DEMO, true],
  ['every address with the demo, wanted', { HOST: '0.0.0.0', SPINWARD_DEMO: true }, DEMO, false],
  ['every address, empty, no demo', { HOST: '0.0.0.0', SPINWARD_DEMO: false }, EMPTY, false],
  ['every address, empty database given', { HOST: '0.0.0.0', DATABASE_URL: URL }, EMPTY, false],
  ['a name that looks like loopback', { HOST: '127.0.0.1.example.org' }, DEMO, true],
  ['every address, own data', { HOST: '0.0.0.0' }, OWN, false],
])('a host is refused or not: %s', (_, settings, contents, refused) => {
  expect(refuseHost(settings, contents) !== undefined).toBe(refused);
});

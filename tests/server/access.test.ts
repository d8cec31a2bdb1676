import fs from 'node:fs';
import path from 'node:path';
import { describe, expect, test } from 'vitest';
import { decide, ROUTES, ruleOf, type Decision, type StudyRole } from '#server/access.ts';

/*
 * Every route × every role × a stranger × signed out. What is expected is written here from the table of people
 * (README.md), not read from the rules under test.
 */

const PERSON = { userId: 'p', administrator: false };
const ADMINISTRATOR = { userId: 'a', administrator: true };
const ROLES: readonly StudyRole[] = ['lead', 'engineer', 'reviewer', 'reader'];

/** All that a person who is not signed in may reach. */
const PUBLIC = new Set([
  'GET /404',
  'GET /500',
  'GET /sign-in',
  'GET /sign-up',
  'GET /forgotten',
  'GET /reset',
  'GET /invitation/[token]',
  'GET /api/health',
  'GET /api/auth/[...all]',
  'POST /api/auth/[...all]',
  'GET /api/v1/openapi.json',
  'POST /api/v1/invitations/[token]',
]);

const API = '/api/v1/studies/[studyId]';
/** Beyond reading: every role may leave; the members' list says who may do more. */
const ANY_MEMBER = new Set([`DELETE ${API}/members/[memberId]`]);
const OWN_WEIGHTS = new Set([
  `PUT ${API}/weights`,
  `POST ${API}/what-ifs`,
  `PATCH ${API}/what-ifs/[whatIfId]`,
  `DELETE ${API}/what-ifs/[whatIfId]`,
]);
const LEAD_ALONE = new Set([
  `DELETE ${API}`,
  `POST ${API}/weights/choice`,
  `POST ${API}/what-ifs/[whatIfId]/adopt`,
  `POST ${API}/members`,
  `PATCH ${API}/members/[memberId]`,
]);

const requests = Object.entries(ROUTES).flatMap(([route, rules]) =>
  Object.keys(rules).map((verb) => ({ route, verb, name: `${verb} ${route}` })),
);
const inStudy = requests.filter(({ route }) => route.includes('[studyId]'));
const administration = requests.filter(({ route }) => /^\/(api\/v1\/)?admin\//.test(route));

function mayIn(role: StudyRole, verb: string, name: string): boolean {
  if (verb === 'GET' || ANY_MEMBER.has(name)) return true;
  if (OWN_WEIGHTS.has(name)) return role !== 'reader';
  if (LEAD_ALONE.has(name)) return role === 'lead';
  return role === 'lead' || role === 'engineer';
}

const ask = (
  { route, verb }: { route: string; verb: string },
  ...[actor, role]: [typeof PERSON | null, StudyRole | null]
): Decision => decide(ruleOf(route, verb), actor, role);

describe.each(requests)('$name', (request) => {
  const { name, verb } = request;
  test('signed out', () => {
    expect(ask(request, null, null)).toBe(PUBLIC.has(name) ? 'allow' : 'signed-out');
  });

  test('a person in no study, and an administrator in no study', () => {
    const studyless = inStudy.includes(request);
    const forAdministrators = administration.includes(request);
    expect(ask(request, PERSON, null)).toBe(studyless || forAdministrators ? 'not-found' : 'allow');
    expect(ask(request, ADMINISTRATOR, null)).toBe(studyless ? 'not-found' : 'allow');
  });

  const roles = inStudy.includes(request) ? ROLES : [];
  test.each(roles)('%s', (role) => {
    const expected = mayIn(role, verb, name) ? 'allow' : 'forbidden';
    expect(ask(request, PERSON, role)).toBe(expected);
    // Administrating the installation opens nothing in a study.
    expect(ask(request, ADMINISTRATOR, role)).toBe(expected);
  });
});

test('what is not listed does not exist, whoever asks', () => {
  for (const [route, verb] of [
    ['/api/v1/studies/[studyId]/nowhere', 'GET'],
    ['/api/v1/studies', 'DELETE'],
    ['constructor', 'GET'],
  ] as const) {
    expect(ruleOf(route, verb)).toBeUndefined();
    expect(decide(ruleOf(route, verb), ADMINISTRATOR, 'lead')).toBe('not-found');
  }
});

test('HEAD follows GET, with or without a slash at the end', () => {
  expect(ruleOf('/studies/', 'HEAD')).toBe('signed-in');
  expect(ruleOf('/api/v1/evaluate', 'HEAD')).toBeUndefined();
});

const PAGES = path.resolve(import.meta.dirname, '../../src/pages');
const VERBS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'];

/** A file of src/pages as Astro's route pattern. */
function patternOf(file: string): string {
  const bare = file.replace(/\.(astro|ts)$/, '').replace(/(^|\/)index$/, '');
  return `/${bare}`.replace(/(.)\/$/, '$1');
}

/** The verbs a file answers: those it exports, or GET for a page. */
function verbsOf(file: string): string[] {
  if (file.endsWith('.astro')) return ['GET'];
  const source = fs.readFileSync(path.join(PAGES, file), 'utf8');
  if (/export const ALL\b/.test(source)) return ['GET', 'POST'];
  return VERBS.filter((verb) => new RegExp(`export (const|async function|function) ${verb}\\b`).test(source));
}

const files = fs
  .readdirSync(PAGES, { recursive: true, encoding: 'utf8' })
  .map((file) => file.split(path.sep).join('/'))
  .filter((file) => /\.(astro|ts)$/.test(file));

describe('the files of src/pages', () => {
  test.each(files)('%s has a rule for each of its verbs', (file) => {
    expect(Object.keys(ROUTES[patternOf(file)] ?? {}).sort()).toEqual(verbsOf(file).sort());
  });

  test('every rule has a file', () => {
    const built = new Set(files.map(patternOf));
    expect(Object.keys(ROUTES).filter((route) => !built.has(route))).toEqual([]);
  });
});

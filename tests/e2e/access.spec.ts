import { randomUUID } from 'node:crypto';
import type { Page } from '@playwright/test';
import { decide, ROUTES, ruleOf, type StudyRole } from '#server/access.ts';
import { DEMO_DOMAIN } from '#scripts/demo.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test, type Person } from './support/test.ts';

/*
 * The access table over HTTP: every address of a study, asked by every role, a stranger and nobody. Writes carry
 * nothing that could be written, so an answer tells only whether one got past the door. What the table itself must
 * say is checked in tests/server/access.test.ts.
 */

type Asker = Person | 'nobody';
const ROLES: Partial<Record<Asker, StudyRole>> = {
  lead: 'lead',
  engineer: 'engineer',
  reviewer: 'reviewer',
  reader: 'reader',
};
const STATUS = { 'signed-out': 401, forbidden: 403, 'not-found': 404 } as const;

const addresses = Object.entries(ROUTES)
  .filter(([route]) => route.includes('[studyId]'))
  .flatMap(([route, rules]) => Object.keys(rules).map((verb) => ({ route, verb })));

/** Addresses of things that this study has none of: past the door there is nothing to be found. */
const UNMADE = ['[uploadId]', '[evidenceId]', '[whatIfId]', '[groupId]', '/ascents/[siteId]'];
const isUnmade = (route: string): boolean => UNMADE.some((part) => route.includes(part));

async function cookieOf(page: Page): Promise<string> {
  const { cookies } = await page.context().storageState();
  return cookies.map(({ name, value }) => `${name}=${value}`).join('; ');
}

/** The status alone: a stream of events is left as soon as it has begun. */
async function statusOf(address: string, verb: string, headers: Record<string, string>): Promise<number> {
  const left = new AbortController();
  const writes = verb !== 'GET';
  const answer = await fetch(address, {
    method: verb,
    redirect: 'manual',
    signal: left.signal,
    headers: { ...headers, ...(writes ? { 'content-type': 'application/json' } : {}) },
    ...(writes && verb !== 'DELETE' ? { body: '{}' } : {}),
  });
  left.abort();
  return answer.status;
}

interface Members {
  items: { id: string }[];
}

async function firstId(page: Page, address: string): Promise<string> {
  const { items } = (await (await page.request.get(address)).json()) as Members;
  return items[0]?.id ?? randomUUID();
}

test('every address of a study, by every role, a stranger and nobody', async ({ open, baseURL }) => {
  test.slow();
  const origin = baseURL ?? '';
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Doors');
  const api = `/api/v1/studies/${study}`;
  for (const login of ['engineer', 'reviewer', 'reader'] as const)
    await lead.request.post(`${api}/members`, {
      headers: fromApp(baseURL),
      data: { email: `${login}@${DEMO_DOMAIN}`, role: ROLES[login] },
    });
  const ids: Record<string, string> = {
    studyId: study,
    memberId: await firstId(lead, `${api}/members`),
    orbitId: await firstId(lead, `${api}/orbits`),
    siteId: await firstId(lead, `${api}/sites`),
    criterionId: await firstId(lead, `${api}/criteria`),
    uploadId: randomUUID(),
  };
  const addressOf = (route: string): string =>
    origin + route.replace(/\[(\w+)\]/g, (_, name: string) => ids[name] ?? randomUUID());

  const surprises: string[] = [];
  for (const asker of ['lead', 'engineer', 'reviewer', 'reader', 'admin', 'nobody'] as const) {
    const headers: Record<string, string> =
      asker === 'nobody' ? {} : { cookie: await cookieOf(await open({ person: asker })), origin };
    for (const { route, verb } of addresses) {
      const actor = asker === 'nobody' ? null : { userId: asker, administrator: asker === 'admin' };
      const decision = decide(ruleOf(route, verb), actor, ROLES[asker] ?? null);
      const status = await statusOf(addressOf(route), verb, headers);
      const isPage = !route.startsWith('/api/');
      const right =
        decision === 'allow'
          ? ![401, 403, 405, 500].includes(status) && (status !== 404 || isUnmade(route))
          : status === (isPage && decision === 'signed-out' ? 302 : STATUS[decision]);
      if (!right) surprises.push(`${asker}: ${verb} ${route} answered ${status}, for ${decision}`);
    }
  }
  expect(surprises).toEqual([]);
});

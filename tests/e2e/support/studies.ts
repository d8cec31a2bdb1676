import type { APIRequestContext } from '@playwright/test';
import { scenario } from '#seed/demo/scenario.ts';
import { expect } from './test.ts';

/** The demo's studies, by what they are to the tests. */
const titles = scenario.studies.map(({ title }) => title);
export const MAIN_STUDY = titles[0] ?? '';

interface Listed {
  items: { id: string; title: string }[];
}

/** The id of a study that whoever asks may see. */
export async function studyId(request: APIRequestContext, title: string): Promise<string> {
  const answer = await request.get(`/api/v1/studies?pageSize=500`);
  expect(answer.status()).toBe(200);
  const { items } = (await answer.json()) as Listed;
  const found = items.find((study) => study.title === title);
  expect(found, `the study ${title}`).toBeDefined();
  return found?.id ?? '';
}

/** Headers of a write by cookie, which has to come from the app's own origin. */
export const fromApp = (baseURL: string | undefined): Record<string, string> => ({ origin: baseURL ?? '' });

/** A new study made from the example, so that what a test changes is no other test's. */
export async function newStudy(
  request: APIRequestContext,
  baseURL: string | undefined,
  title: string,
  from = 'example',
): Promise<string> {
  const answer = await request.post('/api/v1/studies', { headers: fromApp(baseURL), data: { title, from } });
  expect(answer.status(), await answer.text()).toBe(201);
  return ((await answer.json()) as { id: string }).id;
}

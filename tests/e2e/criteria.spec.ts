import AxeBuilder from '@axe-core/playwright';
import type { APIRequestContext, Locator, Page } from '@playwright/test';
import type { Criterion, CriterionList } from '#contract/criterion.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

async function criterionOf(request: APIRequestContext, study: string, name: string): Promise<Criterion> {
  const answer = await request.get(`/api/v1/studies/${study}/criteria?pageSize=500`);
  const { items } = (await answer.json()) as CriterionList;
  const found = items.find((criterion) => criterion.name === name);
  if (!found) throw new Error(`the study has no criterion ${name}`);
  return found;
}

async function opened(page: Page, study: string, criterion: string): Promise<void> {
  await page.goto(`/studies/${study}/criteria?criterion=${criterion}`);
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
}

const handlesOf = (page: Page): Locator => page.getByRole('group', { name: 'Handles of the value function' });

async function dragBy(page: Page, handle: Locator, [right, down]: [number, number]): Promise<void> {
  await handle.scrollIntoViewIfNeeded();
  const box = await handle.boundingBox();
  if (!box) throw new Error('the handle is not drawn');
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + right / 2, y + down / 2);
  await page.mouse.move(x + right, y + down);
  await page.mouse.up();
}

test('a value function is bent by dragging, by keys and by typing, and the last change is undone', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'engineer' });
  const study = await newStudy(page.request, baseURL, 'Bent values');
  const { request } = page;
  const made = await request.post(`/api/v1/studies/${study}/criteria`, {
    headers: fromApp(baseURL),
    data: {
      source: 'entered',
      name: 'Insurance',
      unit: 'M€',
      direction: 'less',
      levels: { mode: 'fixed', worst: 400, best: 200 },
    },
  });
  const { id } = (await made.json()) as Criterion;
  const shape = async () => (await criterionOf(request, study, 'Insurance')).shape;
  await opened(page, study, id);
  await expect(handlesOf(page)).toHaveCount(0);

  const kinds = page.getByRole('group', { name: 'Value between the levels' });
  await kinds.getByText('Points').click();
  const figure = page.getByRole('textbox', { name: 'Figure of point 2' });
  const value = page.getByRole('textbox', { name: 'Value of point 2' });
  await expect(figure).toHaveValue('300');
  await expect(value).toHaveValue('0.500');

  // By hand, in whole per cents; right is towards dearer, which is worse here.
  const point = handlesOf(page).getByRole('slider', { name: 'Point 2 of 3' });
  await dragBy(page, point, [60, -31]);
  await expect(value).not.toHaveValue('0.500');
  const dragged = { figure: await figure.inputValue(), value: await value.inputValue() };
  expect(Number(dragged.figure)).toBeGreaterThan(310);
  expect(Number(dragged.value)).toBeGreaterThan(0.6);
  expect(dragged.value).toMatch(/^0\.\d\d0$/);
  await expect.poll(async () => JSON.stringify(await shape())).toContain(String(Number(dragged.value)));

  // By keys: 1 % of the span and of the value, a tenth of it with Shift.
  await point.focus();
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Shift+ArrowDown');
  await expect(figure).toHaveValue(String(Number(dragged.figure) - 2));
  await expect(value).toHaveValue((Number(dragged.value) - 0.001).toFixed(3));

  // By typing; what will not do stays where it was typed, and says why.
  await value.fill('1.2');
  await value.press('Enter');
  await expect(page.getByText('It lies from 0.000 to 1.000, the values beside it.')).toBeVisible();
  await expect(value).toHaveValue('1.2');
  await value.fill('0.8');
  await value.press('Enter');
  await figure.fill('250');
  await figure.press('Enter');
  const typed = { kind: 'piecewise', knots: [[0, 0], [0.75, 0.8], [1, 1]] }; // prettier-ignore
  await expect.poll(shape).toEqual(typed);

  const { violations } = await new AxeBuilder({ page }).include('.vf-plot').include('.cr-shape').analyze();
  expect(violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`)).toEqual([]);

  await page.getByRole('button', { name: 'Add point' }).click();
  await expect(page.getByRole('textbox', { name: 'Figure of point 3' })).toHaveValue('250');
  await page.getByRole('button', { name: 'Undo last change' }).click();
  await expect.poll(shape).toEqual(typed);
  await expect(page.getByRole('textbox', { name: 'Figure of point 3' })).toHaveCount(0);

  await kinds.getByText('Curve').click();
  const curvature = page.getByRole('textbox', { name: 'Curvature c' });
  await curvature.fill('−2.5');
  await curvature.press('Enter');
  await expect.poll(shape).toEqual({ kind: 'exponential', curvature: -2.5 });
  await expect(handlesOf(page).getByRole('slider', { name: 'Middle of the curve' })).toHaveAttribute(
    'aria-valuetext',
    'value 0.223 at 300 M€',
  );
  await page.reload();
  await expect(curvature).toHaveValue('−2.5');
});

test('a rating with its steps, put into a group that is renamed and taken away again', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Rated and grouped');
  await opened(page, study, '');
  await page.getByRole('button', { name: 'Add criterion' }).first().click();
  const sheet = page.getByRole('complementary', { name: 'New criterion' });
  await sheet.getByText('Rating', { exact: true }).click();
  await sheet.getByLabel('Name').fill('Ground transport');
  await sheet.getByLabel('Step 1').fill('very POOR');
  await sheet.getByRole('button', { name: 'Add criterion' }).click();
  await expect(sheet.getByText('Step 0 has this name already.')).toBeVisible();
  await sheet.getByLabel('Step 1').fill('Track');
  await sheet.getByRole('button', { name: 'Add criterion' }).click();
  await expect(page.getByRole('heading', { name: 'Ground transport' })).toBeVisible();

  await page.getByLabel('Step 4, best').fill('Motorway');
  await page.getByLabel('Step 4, best').blur();
  await page.getByText('At least', { exact: true }).click();
  await page.getByRole('textbox', { name: 'At least' }).fill('4');
  await page.getByRole('textbox', { name: 'At least' }).blur();
  await expect(page.getByRole('region', { name: 'Criteria' })).toContainText('≥ Motorway (4)');

  const groupField = page.getByLabel('Group', { exact: true });
  await groupField.selectOption({ label: 'New group…' });
  await page.getByLabel('Name of the new group').fill('Ground side');
  await page.getByRole('button', { name: 'Make group' }).click();
  await expect(groupField.locator('option:checked')).toHaveText('Ground side');
  const stored = () => criterionOf(page.request, study, 'Ground transport');
  await expect.poll(async () => (await stored()).groupId).not.toBeNull();
  expect((await stored()).steps).toEqual(['Very poor', 'Track', 'Fair', 'Good', 'Motorway']);

  await page.getByLabel('Name of Ground side').fill('Land side');
  await page.getByLabel('Name of Ground side').press('Enter');
  await expect(groupField.locator('option:checked')).toHaveText('Land side');

  await page.getByRole('button', { name: 'Remove Land side' }).click();
  const dialog = page.getByRole('dialog', { name: 'Remove Land side?' });
  await expect(dialog).toContainText('1 criterion stays');
  await dialog.getByRole('button', { name: 'Remove Land side' }).click();
  await expect(groupField.locator('option:checked')).toHaveText('None, weighed by itself');
  await expect.poll(async () => (await stored()).groupId).toBeNull();
});

test('a reader sees points and settings, and nothing to take hold of', async ({ open, baseURL }) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Looked on');
  const headers = fromApp(baseURL);
  const { items } = (await (
    await lead.request.get(`/api/v1/studies/${study}/criteria?pageSize=500`)
  ).json()) as CriterionList;
  const criterion = items.find(({ source, levels }) => source === 'entered' && levels.mode === 'fixed');
  if (!criterion) throw new Error('the example has a number with fixed levels');
  const bent = { kind: 'piecewise', knots: [[0, 0], [0.5, 0.7], [1, 1]] }; // prettier-ignore
  const { id, version } = criterion;
  await lead.request.patch(`/api/v1/studies/${study}/criteria/${id}`, {
    headers,
    data: { shape: bent, version },
  });
  await lead.request.post(`/api/v1/studies/${study}/members`, {
    headers,
    data: { email: 'reader@spinward.test', role: 'reader' },
  });

  const page = await open({ person: 'reader' });
  await opened(page, study, id);
  const points = page.getByRole('table').filter({ hasText: 'Worst level' });
  await expect(points.getByRole('row', { name: /^Point 2 / })).toContainText('0.700');
  await expect(points.getByRole('textbox')).toHaveCount(0);
  await expect(handlesOf(page)).toHaveCount(0);
  await expect(page.getByRole('button', { name: /^Remove / })).toHaveCount(0);
  await expect(page.getByRole('button', { name: 'Undo last change' })).toHaveCount(0);
});

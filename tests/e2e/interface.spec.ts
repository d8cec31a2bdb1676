import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { Cluster } from '#scripts/cluster.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

const run = promisify(execFile);

test('curl uploads a file with a personal key, and commits it', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const study = await newStudy(page.request, baseURL, 'Uploaded by curl', 'blank');
  const made = await page.request.post('/api/v1/account/keys', {
    headers: fromApp(baseURL),
    data: { name: 'curl' },
  });
  const { id: keyId, key } = (await made.json()) as { id: string; key: string };
  const uploads = `${baseURL}/api/v1/studies/${study}/uploads`;
  const curl = async (...args: string[]): Promise<{ status: number; body: unknown }> => {
    const { stdout } = await run('curl', [
      '-sS',
      '-w',
      '\n%{http_code}',
      '-H',
      `Authorization: Bearer ${key}`,
      ...args,
    ]);
    const end = stdout.lastIndexOf('\n');
    return { status: Number(stdout.slice(end)), body: JSON.parse(stdout.slice(0, end)) };
  };

  const upload = await curl('-F', 'file=@seed/candidates-clean.csv', uploads);
  expect(upload.status).toBe(201);
  const preview = upload.body as { uploadId: string; counts: Record<string, number> };
  expect(preview.counts).toMatchObject({ duplicate: 0, refused: 0 });

  const json = ['-H', 'content-type: application/json', '-d', '{"lines":"accepted","duplicates":"skip"}'];
  expect((await curl(...json, `${uploads}/${preview.uploadId}/commit`)).status).toBe(200);
  const sites = await curl(`${baseURL}/api/v1/studies/${study}/sites`);
  expect(sites.body).toMatchObject({ total: preview.counts['new'] });

  await page.request.delete(`/api/v1/account/keys/${keyId}`, { headers: fromApp(baseURL) });
  expect((await curl(`${baseURL}/api/v1/studies`)).status).toBe(401);
});

test('a request from another site’s page is refused, with a session and all', async ({ open }) => {
  const page = await open({ person: 'lead' });
  const answer = await page.request.post('/api/v1/studies', {
    headers: { origin: 'https://evil.example' },
    data: { title: 'From elsewhere', from: 'blank' },
  });
  expect(answer.status()).toBe(403);
});

test('the map’s tiles come in ranges, uncompressed', async ({ request }) => {
  // [read] RFC 9110 section 14.4: a range of 16 bytes is answered with 206 and Content-Range.
  const answer = await request.get('/world.pmtiles', {
    headers: { range: 'bytes=0-15', 'accept-encoding': 'gzip, br' },
  });
  expect(answer.status()).toBe(206);
  expect(answer.headers()['content-range']).toMatch(/^bytes 0-15\/\d{7}$/);
  expect(answer.headers()['content-encoding']).toBeUndefined();
  // [read] PMTiles version 3 specification: the file begins with its name and the version.
  expect((await answer.body()).subarray(0, 7).toString()).toBe('PMTiles');
});

test('an outage of the database is told, and over when it is over', async ({ open, request }) => {
  const page = await open({ person: 'lead' });
  await page.goto('/studies');
  page.complaints.expect(/503|ERR_INCOMPLETE_CHUNKED_ENCODING|ERR_EMPTY_RESPONSE/);
  const cluster = await Cluster.open({ data: process.env['E2E_DATA'] ?? '', durable: false });
  cluster.interrupt();
  try {
    await expect(async () => expect((await request.get('/api/health')).status()).toBe(503)).toPass();
    expect((await page.request.get('/api/v1/studies')).status()).toBe(503);
  } finally {
    await cluster.resume();
    await cluster.leave();
  }
  await expect(async () => expect((await request.get('/api/health')).status()).toBe(200)).toPass();
  await page.goto('/studies');
  await expect(page.locator('h1')).toBeVisible();
});

import { describe, expect, test } from 'vitest';
import { ListQuery } from '#contract/list.ts';
import { z } from '#contract/zod.ts';
import { readJson, readQuery } from '#server/endpoint.ts';

const Body = z.strictObject({ name: z.string(), sources: z.record(z.string(), z.string()).optional() });
const post = (text: string) =>
  readJson(new Request('http://localhost/', { method: 'POST', body: text }), Body);
const queryOf = (search: string) => readQuery(new URL(`http://localhost/?${search}`), ListQuery);

/** PostgreSQL keeps no NUL in a text, and neither NUL nor half a surrogate pair in JSON [from memory]. */
describe('texts that the database cannot keep', () => {
  test('NUL and half a surrogate pair in a body are refused by their path', async () => {
    await expect(post(String.raw`{"name":"a\u0000b"}`)).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'name' }],
    });
    await expect(post(String.raw`{"name":"n","sources":{"x":"\ud83d"}}`)).rejects.toMatchObject({
      errors: [{ path: 'sources.x' }],
    });
  });

  test('whole pairs, accents and an escape that is only text are kept', async () => {
    expect(await post(String.raw`{"name":"\u00e9 \ud83d\ude80"}`)).toEqual({ name: 'é 🚀' });
    expect(await post(String.raw`{"name":"\\u0000"}`)).toEqual({ name: String.raw`\u0000` });
  });

  test('NUL in an address is refused', () => {
    expect(() => queryOf('query=a%00')).toThrow(expect.objectContaining({ code: 'invalid' }));
  });
});

test('a parameter left empty in an address is one left out', () => {
  expect(queryOf('query=&page=&pageSize=20')).toEqual({ query: '', page: 1, pageSize: 20 });
});

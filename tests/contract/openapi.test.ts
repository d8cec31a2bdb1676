import { expect, test } from 'vitest';
import { openApiDocument, operations } from '#contract/openapi/document.ts';
import { ROUTES } from '#server/access.ts';

const document = openApiDocument('https://spinward.example.org');

/** "GET /api/v1/…" of every route of the access table that belongs to the interface. */
const routed = Object.entries(ROUTES)
  .filter(([pattern]) => pattern.startsWith('/api/v1/'))
  .flatMap(([pattern, rules]) =>
    Object.keys(rules).map((verb) => `${verb} ${pattern.replaceAll('[', '{').replaceAll(']', '}')}`),
  );
const described = Object.entries(operations).flatMap(([address, verbs]) =>
  Object.keys(verbs).map((verb) => `${verb.toUpperCase()} ${address}`),
);

test('describes every address and verb that exists, and no other', () => {
  expect(described.sort()).toEqual(routed.sort());
});

test('says which addresses need no sign-in, as the access table does', () => {
  const open = Object.entries(operations).flatMap(([address, verbs]) =>
    Object.entries(verbs).flatMap(([verb, operation]) =>
      operation.open ? [`${verb.toUpperCase()} ${address}`] : [],
    ),
  );
  const isPublic = routed.filter((line) => {
    const [verb = '', address = ''] = line.split(' ');
    const rules = ROUTES[address.replaceAll('{', '[').replaceAll('}', ']')];
    return rules?.[verb as 'GET'] === 'public';
  });
  expect(open.sort()).toEqual(isPublic.sort());
});

test('is OpenAPI 3.1 whose every reference leads somewhere', () => {
  expect(document.openapi).toBe('3.1.0');
  const text = JSON.stringify(document);
  const references = [...text.matchAll(/"\$ref":"#\/components\/schemas\/([^"]+)"/g)].map(([, name]) => name);
  const schemas = Object.keys(document.components?.schemas ?? {});
  expect(references.length).toBeGreaterThan(50);
  for (const name of references) expect(schemas).toContain(name);
});

test('carries units, bounds and the refusal of unknown keys from the schemas that check requests', () => {
  const schemas = document.components?.schemas as Record<string, Record<string, unknown>>;
  expect(schemas['EvaluateSite']).toMatchObject({
    additionalProperties: false,
    properties: { latitudeDeg: { minimum: -90, maximum: 90 } },
  });
});

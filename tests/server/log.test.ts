import { expect, test } from 'vitest';
import { withoutParameters } from '#server/log.ts';

test('a failed query is logged without its parameters', () => {
  const message =
    'Failed query: select "id" from "session" where "token" = $1\nparams: k3y,42\n    at query (session.js:1)';
  expect(withoutParameters(message)).toBe(
    'Failed query: select "id" from "session" where "token" = $1\nparams left out\n    at query (session.js:1)',
  );
});

import pg from 'pg';
import { expect, test } from 'vitest';
import { testDatabase } from '#tests/support/database.ts';

const { appUrl, ownerUrl } = await testDatabase();

/** The SQLSTATE a statement is refused with, or "done". [read] PostgreSQL documentation, appendix A. */
async function attempt(url: string, statement: string): Promise<string> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
    return 'done';
  } catch (error) {
    return (error as pg.DatabaseError).code ?? 'no code';
  } finally {
    await client.end();
  }
}
const INSUFFICIENT_PRIVILEGE = '42501';

test.each([
  'create table public.intruder (i int)',
  'create temporary table intruder (i int)',
  'create schema intruder',
  'alter table study add column intruder int',
  'drop table study',
  'truncate record',
  'update record set object = object',
  'delete from record',
  'delete from "user"',
  `select pgboss.create_queue('intruder', '{}')`,
])('the app may not: %s', async (statement) => {
  expect(await attempt(appUrl, statement)).toBe(INSUFFICIENT_PRIVILEGE);
});

test.each(['select count(*) from record', 'delete from session', 'select count(*) from pgboss.job'])(
  'the app may: %s',
  async (statement) => {
    expect(await attempt(appUrl, statement)).toBe('done');
  },
);

test('the owner may define things', async () => {
  expect(await attempt(ownerUrl, 'create table public.legitimate (i int)')).toBe('done');
});

import { expect, test, vi } from 'vitest';
import { testDatabase } from '#tests/support/database.ts';

const { db } = await testDatabase();
const { sendJob, workJobs } = await import('#server/jobs/boss.ts');
const { stopAll } = await import('#server/lifecycle.ts');

test('a job exists if and only if its transaction commits, and a failed one is tried again', async () => {
  const undone = db.transaction(async (tx) => {
    await sendJob(tx, 'mail', { messageId: 'undone' });
    throw new Error('rolled back');
  });
  await expect(undone).rejects.toThrow('rolled back');
  await db.transaction((tx) => sendJob(tx, 'mail', { messageId: 'kept' }));

  const seen: string[] = [];
  await workJobs('mail', async ({ messageId }) => {
    seen.push(messageId);
    throw new Error('The mail server is away.');
  });
  await vi.waitFor(() => expect(seen).toEqual(['kept']), { timeout: 5_000 });
  await vi.waitFor(async () => {
    const { rows } = await db.execute(
      `select state, retry_limit, start_after > now() as later from pgboss.job`,
    );
    expect(rows).toEqual([{ state: 'retry', retry_limit: 10, later: true }]);
  });
  await stopAll();
});

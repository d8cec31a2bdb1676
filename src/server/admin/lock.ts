import { sql } from 'drizzle-orm';
import type { Db } from '#db/client.ts';

const LOCK = 20_310_403;

/** One change of who is an administrator at a time: two could otherwise each see the other as the one who stays. */
export async function lockAdministrators(tx: Db): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(${LOCK})`);
}

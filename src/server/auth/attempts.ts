import type { PooledDb } from '#db/client.ts';
import {
  deleteFailure,
  deleteFailuresBefore,
  insertFailure,
  listFailures,
  lockAddress,
} from '#db/queries/sign-in.ts';
import { AppError } from '#server/errors.ts';

export const MOST_FAILURES = 10;
export const FAILURE_WINDOW_MS = 10 * 60 * 1000;

/**
 * Books an attempt on an account as failed before the password is looked at, so that attempts made at once are all
 * counted; `forgiveAttempt` takes it back when it succeeds. Known and unknown addresses are treated alike.
 * @returns the booking
 * @throws AppError 'too-many-requests' with Retry-After where ten failed within ten minutes
 */
export async function bookAttempt(
  db: PooledDb,
  { email, now }: { email: string; now: Date },
): Promise<string> {
  const since = new Date(now.getTime() - FAILURE_WINDOW_MS);
  return db.transaction(async (tx) => {
    await lockAddress(tx, { email });
    await deleteFailuresBefore(tx, { before: since });
    const failures = await listFailures(tx, { email, since, limit: MOST_FAILURES });
    const oldest = failures[MOST_FAILURES - 1];
    if (oldest) {
      const waitMs = oldest.getTime() + FAILURE_WINDOW_MS - now.getTime();
      throw tooManyRequests(Math.ceil(waitMs / 1000));
    }
    return insertFailure(tx, { email, at: now });
  });
}

export const forgiveAttempt = (db: PooledDb, booking: string): Promise<void> =>
  deleteFailure(db, { id: booking });

export function tooManyRequests(waitS: number): AppError {
  const wait = waitS > 90 ? `${Math.ceil(waitS / 60)} minutes` : `${Math.max(waitS, 1)} s`;
  return new AppError('too-many-requests', `Too many attempts. Try again in ${wait}.`, {
    headers: { 'retry-after': String(Math.max(waitS, 1)) },
  });
}

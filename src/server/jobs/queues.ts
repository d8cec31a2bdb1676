/** What a job of each queue carries: ids only, the rest is read when the job runs. */
export interface Jobs {
  mail: { messageId: string };
  /** A few flights to be flown one after the other, by the hashes of their inputs. */
  ascents: { hashes: string[] };
}
export type Queue = keyof Jobs;

/**
 * Every queue. The owner role makes them while migrating, because making a queue makes a table partition, which the
 * app's role may not do.
 */
export const QUEUES: readonly Queue[] = ['mail', 'ascents'];

/** The schema pg-boss lives in. */
export const JOBS_SCHEMA = 'pgboss';

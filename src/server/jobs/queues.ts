/**
 * Every queue of the job worker. The owner role makes them while migrating, because making a queue makes a
 * table partition, which the app's role may not do.
 */
export const QUEUES = ['mail'] as const;
export type Queue = (typeof QUEUES)[number];

/** The schema pg-boss lives in. */
export const JOBS_SCHEMA = 'pgboss';

import { timestamp, uuid } from 'drizzle-orm/pg-core';
import { v7 } from 'uuid';

/** The one maker of identifiers: UUIDv7, so that they sort by the time they were made. */
export const newId = (): string => v7();

export const idColumn = () => uuid('id').primaryKey().$defaultFn(newId);

/** An instant; stored with time zone, read as a Date. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

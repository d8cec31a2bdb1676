import { z } from './zod.ts';

export const DEFAULT_PAGE_SIZE = 50;
export const MAX_PAGE_SIZE = 500;

const whole = (most: number) => z.coerce.number().int().min(1).max(most);

/** What every list takes in its address. */
export const listFields = {
  query: z.string().trim().max(200).default('').meta({ description: 'Text to look for, whatever its case' }),
  page: whole(1_000_000).default(1).meta({ description: 'Page, counted from 1' }),
  pageSize: whole(MAX_PAGE_SIZE).default(DEFAULT_PAGE_SIZE).meta({ description: 'Items a page' }),
};

export const ListQuery = z.object(listFields);
export type ListQuery = z.infer<typeof ListQuery>;

/** What every list answers: a page of it, and how many there are in all. */
export const listOf = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), total: z.int() });

export interface List<T> {
  items: T[];
  total: number;
}

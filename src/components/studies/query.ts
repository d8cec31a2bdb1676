import { DEFAULT_PAGE_SIZE } from '#contract/list.ts';
import { StudyListQuery } from '#contract/study.ts';

/** What an address asks for; what does not fit in it counts as not asked. */
export function queryOf(search: URLSearchParams): StudyListQuery {
  const parsed = StudyListQuery.safeParse(Object.fromEntries(search));
  return parsed.success ? parsed.data : StudyListQuery.parse({});
}

/** The same as an address's search, without what is the default. */
export function searchOf({ query, state, archived, page, pageSize }: StudyListQuery): string {
  const search = new URLSearchParams();
  if (query) search.set('query', query);
  if (state) search.set('state', state);
  if (archived !== 'false') search.set('archived', archived);
  if (page !== 1) search.set('page', String(page));
  if (pageSize !== DEFAULT_PAGE_SIZE) search.set('pageSize', String(pageSize));
  const text = search.toString();
  return text && `?${text}`;
}

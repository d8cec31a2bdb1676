import type { EnteredValue } from '#contract/site.ts';
import type { Db } from '#db/client.ts';
import { listCriteria, type CriterionRow } from '#db/queries/criterion.ts';
import { AppError } from '#server/errors.ts';

function faultOf(criterion: CriterionRow | undefined, value: EnteredValue | null): string | undefined {
  if (!criterion) return 'This study has no such criterion.';
  if (criterion.source === 'computed') return `${criterion.name} is computed; it takes no entered figure.`;
  if (value === null) return undefined;
  if (criterion.source === 'entered' && typeof value !== 'number') return `${criterion.name} takes a number.`;
  if (criterion.source === 'text' && typeof value !== 'string') return `${criterion.name} takes a text.`;
  return undefined;
}

/** @throws AppError 'invalid' where a figure is for no entered criterion of the study, or of the wrong kind */
export async function checkEnteredValues(
  tx: Db,
  { studyId, values }: { studyId: string; values: Record<string, EnteredValue | null> },
): Promise<void> {
  if (Object.keys(values).length === 0) return;
  const criteria = new Map((await listCriteria(tx, { studyId })).map((row) => [row.id, row]));
  const errors = Object.entries(values).flatMap(([id, value]) => {
    const message = faultOf(criteria.get(id), value);
    return message ? [{ path: `values.${id}`, message }] : [];
  });
  const first = errors[0];
  if (first) throw new AppError('invalid', `${first.message} Nothing was saved.`, { errors });
}

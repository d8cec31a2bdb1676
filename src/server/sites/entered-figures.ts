import { faultInWords, keptParticulars } from '#contract/figure.ts';
import type { EnteredValue, FigureParticulars } from '#contract/site.ts';
import { figureFaults } from '#core/decision/entered-figure.ts';
import type { Db } from '#db/client.ts';
import { listCriteria, type CriterionRow } from '#db/queries/criterion.ts';
import { AppError, type FieldError } from '#server/errors.ts';

/** A site's entered figures and what is known of them, by criterion id. */
export interface Figures {
  values: Record<string, EnteredValue>;
  particulars: Record<string, FigureParticulars>;
}

/** A change of figures; null takes a figure, or what is known of it, away. */
export interface FiguresPatch {
  values?: Record<string, EnteredValue | null> | undefined;
  particulars?: Record<string, FigureParticulars | null> | undefined;
}

/**
 * What a site's figures become. A figure taken away takes what was known of it along; nothing else goes unasked.
 */
export function patchedFigures(before: Figures, patch: FiguresPatch): Figures {
  const values = withoutNull({ ...before.values, ...patch.values });
  const given = Object.entries({ ...before.particulars, ...patch.particulars });
  const kept = given.map(([id, known]) => [id, known === null ? null : keptParticulars(known)] as const);
  const particulars = Object.fromEntries(
    kept.filter(([id]) => patch.values?.[id] !== null || Boolean(patch.particulars?.[id])),
  );
  return { values, particulars: withoutNull(particulars) };
}

/**
 * Checks the figures that a change touches, as they would stand after it.
 * @throws AppError 'invalid' with every fault by its path
 */
export async function checkFigures(
  tx: Db,
  { studyId, after, patch }: { studyId: string; after: Figures; patch: FiguresPatch },
): Promise<void> {
  const ids = new Set([...Object.keys(patch.values ?? {}), ...Object.keys(patch.particulars ?? {})]);
  if (ids.size === 0) return;
  const criteria = new Map((await listCriteria(tx, { studyId })).map((row) => [row.id, row]));
  const errors = [...ids].flatMap((id) => faultsOf(id, criteria.get(id), after, patch));
  const first = errors[0];
  if (first) throw new AppError('invalid', `${first.message} Nothing was saved.`, { errors });
}

function faultsOf(
  id: string,
  criterion: CriterionRow | undefined,
  { values, particulars }: Figures,
  patch: FiguresPatch,
): FieldError[] {
  const path = patch.values && id in patch.values ? `values.${id}` : `particulars.${id}`;
  const value = values[id];
  const unfit = kindFault(criterion, value);
  if (unfit !== undefined) return [{ path, message: unfit }];
  const known = particulars[id];
  if (known !== undefined && criterion?.source === 'text')
    return [{ path, message: `${criterion.name} is a text; it takes no low, high or source.` }];
  if (known !== undefined && value === undefined)
    return [{ path, message: `${criterion?.name ?? 'It'} has no figure for this to belong to.` }];
  const parts = { ...known, likely: typeof value === 'number' ? value : undefined };
  return figureFaults(parts, criterion?.source === 'rating').map((fault) => ({
    // A figure that leaves its low or high behind is at fault itself, where they were not sent along.
    path:
      fault.part === 'likely' || !patch.particulars?.[id]
        ? `values.${id}`
        : `particulars.${id}.${fault.part}`,
    message: faultInWords(fault, parts),
  }));
}

function kindFault(criterion: CriterionRow | undefined, value: EnteredValue | undefined): string | undefined {
  if (!criterion) return 'This study has no such criterion.';
  const { name, source } = criterion;
  if (source === 'computed') return `${name} is computed; it takes no entered figure.`;
  if (value === undefined) return undefined;
  if (source === 'text') return typeof value === 'string' ? undefined : `${name} takes a text.`;
  return typeof value === 'number' ? undefined : `${name} takes a number.`;
}

function withoutNull<T>(entries: Record<string, T | null | undefined>): Record<string, T> {
  return Object.fromEntries(
    Object.entries(entries).filter(
      (entry): entry is [string, T] => entry[1] !== null && entry[1] !== undefined,
    ),
  );
}

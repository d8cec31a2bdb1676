import { CriterionPatch, type Criterion } from '#contract/criterion.ts';

/** A criterion as its form holds it; numbers as typed until they can be read. */
export interface CriterionFields {
  name: string;
  unit: string;
  direction: Criterion['direction'];
  levelMode: 'candidates' | 'fixed';
  worst: number | string | undefined;
  best: number | string | undefined;
  limitKind: 'none' | 'at-least' | 'at-most';
  limitValue: number | string | undefined;
}

export const CRITERION_FIELDS = [
  'name',
  'unit',
  'direction',
  'levelMode',
  'worst',
  'best',
  'limitKind',
  'limitValue',
] as const satisfies readonly (keyof CriterionFields)[];

/** What of a criterion its form writes. */
export type CriterionSettings = Pick<Criterion, 'name' | 'unit' | 'direction' | 'levels' | 'limit'>;
const SETTINGS = ['name', 'unit', 'direction', 'levels', 'limit'] as const;

export function fieldsOf({ name, unit, direction, levels, limit }: Criterion): CriterionFields {
  return {
    name,
    unit,
    direction,
    levelMode: levels.mode,
    worst: levels.mode === 'fixed' ? levels.worst : undefined,
    best: levels.mode === 'fixed' ? levels.best : undefined,
    limitKind: limit?.kind ?? 'none',
    limitValue: limit?.value,
  };
}

/** The settings a form's fields stand for; still unchecked, since fields may hold text that is no number. */
export function settingsOf(fields: CriterionFields): Record<keyof CriterionSettings, unknown> {
  const { name, unit, direction, levelMode, worst, best, limitKind, limitValue } = fields;
  return {
    name,
    unit,
    direction,
    levels: levelMode === 'fixed' ? { mode: 'fixed', worst, best } : { mode: 'candidates' },
    limit: limitKind === 'none' ? null : { kind: limitKind, value: limitValue },
  };
}

const FIELD_OF_PATH: Readonly<Record<string, keyof CriterionFields>> = {
  name: 'name',
  unit: 'unit',
  direction: 'direction',
  'levels.worst': 'worst',
  'levels.best': 'best',
  'limit.value': 'limitValue',
};

export type ReadCriterion =
  | { ok: true; settings: CriterionSettings }
  | { ok: false; errors: { field: keyof CriterionFields; message: string }[] };

/** Checks a form by the contract's schema. */
export function readCriterion(fields: CriterionFields): ReadCriterion {
  const result = CriterionPatch.safeParse(settingsOf(fields));
  if (result.success) return { ok: true, settings: result.data as CriterionSettings };
  return {
    ok: false,
    errors: result.error.issues.map(({ path, message }) => ({
      field: FIELD_OF_PATH[path.map(String).join('.')] ?? 'name',
      message,
    })),
  };
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** What the settings change of a criterion as it is kept. A computed one keeps its unit. */
export function changesOf(criterion: Criterion, settings: CriterionSettings): Partial<CriterionSettings> {
  const changed = SETTINGS.filter(
    (key) => !same(settings[key], criterion[key]) && !(key === 'unit' && criterion.source === 'computed'),
  );
  return Object.fromEntries(changed.map((key) => [key, settings[key]]));
}

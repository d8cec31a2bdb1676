import { CriterionPatch, RATING_STEPS, type Criterion, type CriterionShape } from '#contract/criterion.ts';

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
  shape: CriterionShape;
  /** Id of its group; empty where it stands by itself. */
  group: string;
  /** Names of a rating's steps; empty where it is no rating. */
  steps: string[];
}

type FieldName = Exclude<keyof CriterionFields, 'steps'> | `steps.${number}`;

export const CRITERION_FIELDS = [
  'name',
  'unit',
  'direction',
  'levelMode',
  'worst',
  'best',
  'limitKind',
  'limitValue',
  'shape',
  'group',
  ...Array.from({ length: RATING_STEPS }, (_, step) => `steps.${step}` as const),
] as const satisfies readonly FieldName[];

/** What of a criterion its form writes. */
const SETTINGS = ['name', 'unit', 'direction', 'levels', 'limit', 'shape', 'groupId', 'steps'] as const;
export type CriterionSettings = Pick<Criterion, (typeof SETTINGS)[number]>;

export function fieldsOf(criterion: Criterion): CriterionFields {
  const { name, unit, direction, levels, limit, shape, groupId, steps } = criterion;
  return {
    name,
    unit,
    direction,
    levelMode: levels.mode,
    worst: levels.mode === 'fixed' ? levels.worst : undefined,
    best: levels.mode === 'fixed' ? levels.best : undefined,
    limitKind: limit?.kind ?? 'none',
    limitValue: limit?.value,
    shape,
    group: groupId ?? '',
    steps: steps ?? [],
  };
}

/** The settings a form's fields stand for; still unchecked, since fields may hold text that is no number. */
export function settingsOf(fields: CriterionFields): Partial<Record<keyof CriterionSettings, unknown>> {
  const { name, unit, direction, levelMode, worst, best, limitKind, limitValue, shape, group, steps } =
    fields;
  return {
    name,
    unit,
    direction,
    levels: levelMode === 'fixed' ? { mode: 'fixed', worst, best } : { mode: 'candidates' },
    limit: limitKind === 'none' ? null : { kind: limitKind, value: limitValue },
    shape,
    groupId: group === '' ? null : group,
    ...(steps.length > 0 ? { steps } : {}),
  };
}

const FIELD_OF_PATH: Readonly<Record<string, FieldName>> = {
  name: 'name',
  unit: 'unit',
  direction: 'direction',
  'levels.worst': 'worst',
  'levels.best': 'best',
  'limit.value': 'limitValue',
  groupId: 'group',
};

/** A fault of the steps as a whole stands at the first; one of the shape is the shape's, however deep it lies. */
function fieldOf(path: readonly PropertyKey[]): FieldName {
  const [head, step = 0] = path;
  if (head === 'steps') return `steps.${Number(step)}`;
  return head === 'shape' ? 'shape' : (FIELD_OF_PATH[path.map(String).join('.')] ?? 'name');
}

export type ReadCriterion =
  { ok: true; settings: CriterionSettings } | { ok: false; errors: { field: FieldName; message: string }[] };

/** Checks a form by the contract's schema. */
export function readCriterion(fields: CriterionFields): ReadCriterion {
  const result = CriterionPatch.safeParse(settingsOf(fields));
  if (result.success) return { ok: true, settings: { steps: null, ...result.data } as CriterionSettings };
  return {
    ok: false,
    errors: result.error.issues.map(({ path, message }) => ({
      field: fieldOf(path),
      message,
    })),
  };
}

export const keepsUnit = ({ source }: Pick<Criterion, 'source'>): boolean =>
  source === 'computed' || source === 'rating';

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** What the settings change of a criterion as it is kept. A computed one and a rating keep their unit. */
export function changesOf(criterion: Criterion, settings: CriterionSettings): Partial<CriterionSettings> {
  const changed = SETTINGS.filter(
    (key) => !same(settings[key], criterion[key]) && !(key === 'unit' && keepsUnit(criterion)),
  );
  return Object.fromEntries(changed.map((key) => [key, settings[key]]));
}

/** What stands in the place of a change before it is made. */
export const settingsNow = (
  criterion: Criterion,
  change: Partial<CriterionSettings>,
): Partial<CriterionSettings> =>
  Object.fromEntries(
    (Object.keys(change) as (keyof CriterionSettings)[]).map((key) => [key, criterion[key]]),
  );

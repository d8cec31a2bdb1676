import { CriterionInput, levelsOf } from '#contract/criterion.ts';
import { pointsStatement } from '#contract/weights.ts';
import { QUANTITIES, quantityName } from '#contract/quantity.ts';
import { OrbitInput } from '#contract/requirement.ts';
import { SiteInput } from '#contract/site.ts';
import { DEFAULT_TURN_SPEED_FRACTION } from '#contract/evaluate.ts';
import { foldName } from '#core/csv/codes.ts';
import { newId } from '#db/columns.ts';
import type { StudyContents, WeightSaying } from '#db/queries/contents.ts';
import { levelColumns, limitColumns } from '#server/criteria/present.ts';
import { inputFields, orbitColumns } from '#server/requirement/orbit-values.ts';
import type { DemoCriterion, DemoSite, DemoStudy } from '#seed/demo/shape.ts';

/** Names of a scenario made ids, so that the interface's schemas, which know ids, check it. */
class Ids {
  readonly #ids = new Map<string, string>();
  constructor(names: readonly string[]) {
    for (const name of names) this.#ids.set(name, newId());
  }
  of(name: string): string {
    const id = this.#ids.get(name);
    if (id === undefined) throw new RangeError(`scenario: nothing is called ${name}`);
    return id;
  }
  keyed<V>(values: Readonly<Record<string, V>>): Record<string, V> {
    return Object.fromEntries(Object.entries(values).map(([name, value]) => [this.of(name), value]));
  }
}

function criterionOf(
  { key: name, orbitCode, group, ...draft }: DemoCriterion,
  ids: { weighed: Ids; orbits: Ids },
  orbitNames: ReadonlyMap<string, string>,
): StudyContents['criteria'][number] {
  const key = ids.weighed.of(name);
  const groupKey = group === undefined ? null : ids.weighed.of(group);
  const orbitKey = orbitCode === undefined ? null : ids.orbits.of(orbitCode);
  const input = CriterionInput.parse(draft.source === 'computed' ? { ...draft, orbitId: orbitKey } : draft);
  const settings = { ...levelColumns(levelsOf(input)), shape: input.shape, ...limitColumns(input.limit) };
  if (input.source === 'rating')
    return {
      key,
      groupKey,
      orbitKey: null,
      name: input.name,
      nameKey: foldName(input.name),
      unit: '',
      direction: input.direction,
      source: 'rating',
      ratingSteps: input.steps,
      ...settings,
    };
  if (input.source !== 'computed')
    return {
      key,
      groupKey,
      orbitKey: null,
      name: input.name,
      nameKey: foldName(input.name),
      unit: input.unit,
      direction: input.direction,
      source: input.source,
      ...settings,
    };
  const orbitName = orbitCode === undefined ? null : (orbitNames.get(orbitCode) ?? orbitCode);
  const shown = input.name ?? quantityName(input.quantity, orbitName);
  return {
    key,
    groupKey,
    orbitKey,
    name: shown,
    nameKey: foldName(shown),
    unit: QUANTITIES[input.quantity].unit,
    direction: input.direction ?? QUANTITIES[input.quantity].direction,
    source: 'computed',
    quantity: input.quantity,
    ...settings,
  };
}

function siteOf(
  { values = {}, particulars = {}, ...draft }: DemoSite,
  criteria: Ids,
): StudyContents['sites'][number] {
  const keyed = { values: criteria.keyed(values), particulars: criteria.keyed(particulars) };
  const site = SiteInput.parse({ ...draft, ...keyed });
  return { ...site, code: draft.code, nameKey: foldName(site.name) };
}

/**
 * A study of a scenario as contents to write, checked by the interface's own schemas.
 * @returns the contents, and what a scenario's points, by criterion key and group name, say in them
 * @throws ZodError, RangeError where the scenario does not hold together
 */
export function scenarioContents(
  study: DemoStudy,
  vehicle: StudyContents['vehicle'],
): { contents: StudyContents; saying: (points: Record<string, number>) => WeightSaying } {
  const groups = [...new Set(study.criteria.flatMap(({ group }) => group ?? []))];
  const ids = {
    orbits: new Ids(study.orbits.map(({ code }) => code)),
    weighed: new Ids([...study.criteria.map(({ key }) => key), ...groups]),
  };
  const saying = (points: Record<string, number>) => pointsStatement(ids.weighed.keyed(points));
  const orbitNames = new Map(study.orbits.map(({ code, name }) => [code, name ?? code]));
  const contents: StudyContents = {
    head: {
      organisation: study.organisation,
      question: study.question,
      decideBy: study.decideBy,
      turnSpeedFraction: DEFAULT_TURN_SPEED_FRACTION,
      losses: 'entered',
    },
    vehicle,
    orbits: study.orbits.map((draft) => {
      const input = OrbitInput.parse(draft);
      return { key: ids.orbits.of(draft.code), ...orbitColumns(inputFields(input, draft.code)) };
    }),
    groups: groups.map((name) => ({ key: ids.weighed.of(name), name, nameKey: foldName(name) })),
    criteria: study.criteria.map((draft) => criterionOf(draft, ids, orbitNames)),
    sites: study.sites.map((draft) => siteOf(draft, ids.weighed)),
    weights: saying(study.points),
  };
  return { contents, saying };
}

import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { ASCENT_METHOD } from '#contract/ascent-job.ts';
import type { EvaluateInput } from '#contract/evaluate.ts';
import type { RankingSnapshot } from '#server/ranking/read-snapshot.ts';
import { weightsByName } from './inputs-weights.ts';

/**
 * Everything a memo's figures follow from, without the study's own ids and in an order of its own, so that the same
 * inputs are the same text wherever they were entered. `evaluate` may be posted to the interface as it is.
 */
function inputsOf({ inputs, flown, criteria, groups, entered, study }: RankingSnapshot) {
  const orbitCode = new Map(inputs.orbits.map(({ orbitId, code }) => [orbitId, code]));
  const nameOf = new Map(criteria.map(({ id, name }) => [id, name]));
  const groupName = new Map(groups.map(({ id, name }) => [id, name]));
  const byName = <V>(held: Readonly<Record<string, V>> | undefined): Record<string, V> =>
    Object.fromEntries(
      Object.entries(held ?? {}).flatMap(([id, value]) => {
        const name = nameOf.get(id);
        return name === undefined ? [] : [[name, value]];
      }),
    );
  const evaluate: Omit<EvaluateInput, 'vehicle'> & { vehicle?: EvaluateInput['vehicle'] } = {
    sites: inputs.sites.map(({ siteId: _, ...site }) => site),
    orbits: inputs.orbits.map(({ orbitId: _, ...orbit }) => orbit),
    ...(inputs.vehicle ? { vehicle: inputs.vehicle } : {}),
    settings: inputs.settings,
    others: false,
  };
  return {
    evaluate,
    // Flown ascents follow from the same inputs by this version of their method.
    ...(flown === null ? {} : { losses: { flown: ASCENT_METHOD } }),
    criteria: criteria.map(
      ({ name, unit, direction, source, quantity, orbitId, levels, shape, groupId, steps, limit }) => ({
        name,
        unit,
        direction,
        source,
        quantity,
        orbit: orbitId === null ? null : (orbitCode.get(orbitId) ?? null),
        levels,
        shape,
        group: groupId === null ? null : (groupName.get(groupId) ?? null),
        steps,
        limit,
      }),
    ),
    weights: weightsByName(study, { criteria, groups }),
    figures: Object.fromEntries(
      inputs.sites.map(({ siteId, code }) => [code, byName(entered.get(siteId)?.values)]),
    ),
    particulars: Object.fromEntries(
      inputs.sites.map(({ siteId, code }) => [code, byName(entered.get(siteId)?.particulars)]),
    ),
  };
}

/** The inputs as canonical JSON (RFC 8785) in UTF-8, and its SHA-256 in hexadecimal. */
export function canonicalInputs(snapshot: RankingSnapshot): { text: string; checksum: string } {
  const text = canonicalize(inputsOf(snapshot)) ?? '';
  return { text, checksum: createHash('sha256').update(text, 'utf8').digest('hex') };
}

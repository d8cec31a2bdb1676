import type { SettlementInside } from '#contract/downrange.ts';

export type SettlementOrder = 'name' | 'people' | 'downrangeKm' | 'crossrangeKm';

const compare: Record<SettlementOrder, (a: SettlementInside, b: SettlementInside) => number> = {
  name: (a, b) => a.name.localeCompare(b.name, 'en'),
  people: (a, b) => b.people - a.people,
  downrangeKm: (a, b) => a.downrangeKm - b.downrangeKm,
  crossrangeKm: (a, b) => Math.abs(a.crossrangeKm) - Math.abs(b.crossrangeKm),
};

const plain = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/\p{Diacritic}/gu, '')
    .toLowerCase();

/** Settlements in an order, those whose name holds a text whatever its case and accents; equal ones as they came. */
export function sortedSettlements(
  settlements: readonly SettlementInside[],
  order: SettlementOrder,
  find: string,
): SettlementInside[] {
  const wanted = plain(find.trim());
  return settlements.filter(({ name }) => plain(name).includes(wanted)).sort(compare[order]);
}

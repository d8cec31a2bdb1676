/** A site as it is usually kept: an object with a figure a criterion. */
export interface PlainSite {
  code: string;
  figures: { low: number; likely: number; high: number }[];
}

function triangular({ low, likely, high }: PlainSite['figures'][number], u: number): number {
  if (low === high) return likely;
  const mode = (likely - low) / (high - low);
  return u < mode
    ? low + Math.sqrt(u * (high - low) * (likely - low))
    : high - Math.sqrt((1 - u) * (high - low) * (high - likely));
}

/**
 * The same analysis as core's, written the straightforward way: arrays of objects, a new one for every draw. Figures run
 * from 0 (worst) to 100 (best); weights from the whole simplex.
 */
export function plainAcceptability(sites: readonly PlainSite[], samples: number, next: () => number) {
  const criteria = sites[0]?.figures.length ?? 0;
  const uncertain = sites.some(({ figures }) => figures.some(({ low, high }) => low !== high));
  const tally = sites.map(() => ({
    ranks: sites.map(() => 0),
    wins: sites.map(() => 0),
    weights: Array<number>(criteria).fill(0),
  }));
  const draw = () => sites.map(({ figures }) => figures.map((figure) => triangular(figure, next()) / 100));
  const valueOf = (weights: number[], values: number[]) =>
    weights.reduce((sum, w, j) => sum + w * (values[j] ?? 0), 0);
  for (let sample = 0; sample < samples; sample++) {
    const cuts = Array.from({ length: criteria - 1 }, next).sort((a, b) => a - b);
    const weights = [...cuts, 1].map((cut, j) => cut - (cuts[j - 1] ?? 0));
    const order = draw()
      .map((values, site) => ({ site, value: valueOf(weights, values) }))
      .sort((a, b) => b.value - a.value);
    order.forEach(({ site }, rank) => {
      const ranks = tally[site]?.ranks ?? [];
      ranks[rank] = (ranks[rank] ?? 0) + 1;
      const wins = tally[site]?.wins ?? [];
      for (const below of order.slice(rank + 1)) wins[below.site] = (wins[below.site] ?? 0) + 1;
    });
    const leader = tally[order[0]?.site ?? 0];
    if (leader) leader.weights = leader.weights.map((sum, j) => sum + (weights[j] ?? 0));
  }
  const led = tally.map(() => 0);
  for (let sample = 0; sample < (uncertain ? samples : 1); sample++) {
    const values = draw();
    tally.forEach(({ ranks, weights }, site) => {
      if (ranks[0] === 0) return;
      const central = weights.map((sum) => sum / (ranks[0] ?? 1));
      const own = valueOf(central, values[site] ?? []);
      if (values.every((row) => valueOf(central, row) <= own)) led[site] = (led[site] ?? 0) + 1;
    });
  }
  return { tally, led };
}

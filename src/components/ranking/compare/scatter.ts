import type { RankingModel } from '#contract/ranking-model.ts';
import { CELL } from '#core/decision/figures.ts';
import { edgeOf } from '#core/decision/edge.ts';
import { subsetOf } from '#core/decision/subset.ts';

/** `edge`: no ranked site beats it on one of the two criteria without losing on the other. `apart`: not ranked. */
export type Standing = 'leader' | 'edge' | 'ranked' | 'apart';

export interface ScatterPoint {
  siteId: string;
  name: string;
  /** Figures in the criteria's units. */
  x: number;
  y: number;
  standing: Standing;
  onEdge: boolean;
}

export interface ScatterPoints {
  /** In the order of the list: ranked ones first. */
  points: ScatterPoint[];
  /** The non-dominated edge, from the best across to the best up. */
  edge: ScatterPoint[];
  /** Sites that lack one of the two figures. */
  unplaced: number;
}

/** Every site that has both figures; the edge is that of ranked ones. */
export function scatterPoints(model: RankingModel, across: number, up: number): ScatterPoints {
  const { prepared, rows, figures } = model;
  const { criterionCount, states, figures: numbers } = prepared.table;
  const has = (site: number, j: number): boolean => states[site * criterionCount + j] === CELL.figure;
  const placed = rows.filter(({ site }) => has(site, across) && has(site, up));
  const ranked = placed.filter(({ kind }) => kind === 'ranked').map(({ site }) => site);
  const part = subsetOf(prepared, ranked);
  const edgeSites = edgeOf({ ...part.table, values: part.values }, across, up).map((site) => ranked[site]);
  const onEdge = new Set(edgeSites);
  const points = placed.map((listed): ScatterPoint => {
    const { site } = listed;
    const { siteId = '', name = '' } = figures.sites[site] ?? {};
    const leads = listed.kind === 'ranked' && listed.rank === 1;
    return {
      siteId,
      name,
      x: numbers[site * criterionCount + across] ?? 0,
      y: numbers[site * criterionCount + up] ?? 0,
      standing: leads ? 'leader' : onEdge.has(site) ? 'edge' : listed.kind === 'ranked' ? 'ranked' : 'apart',
      onEdge: onEdge.has(site),
    };
  });
  const bySite = new Map(placed.map(({ site }, at) => [site, points[at]]));
  return {
    points,
    edge: edgeSites.flatMap((site) => (site === undefined ? [] : (bySite.get(site) ?? []))),
    unplaced: rows.length - placed.length,
  };
}

export interface PlacedLabel {
  siteId: string;
  name: string;
  x: number;
  y: number;
  anchor: 'start' | 'end' | 'middle';
}

const CHARACTER = 6.6;
const LINE = 14;
const CLEAR = 9;
const MOST_LABELS = 40;
const WEIGHT: Record<Standing, number> = { leader: 0, edge: 1, ranked: 2, apart: 3 };

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const overlaps = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/**
 * Names beside their points where there is room: the leader's first, then those on the edge, then by rank.
 * @param points with their places in px
 * @param frame within which names stay
 */
export function placeLabels(
  points: readonly (Pick<ScatterPoint, 'siteId' | 'name' | 'standing' | 'onEdge'> & {
    px: number;
    py: number;
  })[],
  frame: Box,
): PlacedLabel[] {
  const weightOf = ({ standing, onEdge }: (typeof points)[number]): number =>
    onEdge ? Math.min(WEIGHT[standing], 1) : WEIGHT[standing];
  const wanted = [...points].sort((a, b) => weightOf(a) - weightOf(b)).slice(0, MOST_LABELS);
  const taken: Box[] = wanted.map(({ px, py }) => ({
    left: px - 5,
    right: px + 5,
    top: py - 5,
    bottom: py + 5,
  }));
  const labels: PlacedLabel[] = [];
  wanted.forEach(({ siteId, name, px, py }, at) => {
    const width = name.length * CHARACTER;
    const tries: (PlacedLabel & Box)[] = [
      { anchor: 'start' as const, x: px + CLEAR, y: py + 4, left: px + CLEAR },
      { anchor: 'end' as const, x: px - CLEAR, y: py + 4, left: px - CLEAR - width },
      { anchor: 'middle' as const, x: px, y: py - CLEAR, left: px - width / 2 },
      { anchor: 'middle' as const, x: px, y: py + CLEAR + 9, left: px - width / 2 },
    ].map((place) => ({
      siteId,
      name,
      ...place,
      right: place.left + width,
      top: place.y - LINE + 3,
      bottom: place.y + 3,
    }));
    const free = tries.find(
      (box) =>
        box.left >= frame.left &&
        box.right <= frame.right &&
        box.top >= frame.top &&
        box.bottom <= frame.bottom &&
        !taken.some((other, other_at) => other_at !== at && overlaps(box, other)),
    );
    if (!free) return;
    taken.push(free);
    labels.push({ siteId, name, x: free.x, y: free.y, anchor: free.anchor });
  });
  return labels;
}

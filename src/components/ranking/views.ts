import type { ComponentType } from 'react';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { WeightsOf } from '#contract/weights.ts';
import type { Sheet } from './columns.ts';
import type { LiveRanking } from './use-ranking.ts';
import type { Viewer } from './viewer.ts';

/** What a view of the ranking is given. It is drawn in the browser alone, once the figures have been read. */
export interface RankingViewProps {
  studyId: string;
  /** The study's title, for the names of files. */
  title: string;
  /** The ranking under the weights chosen. */
  model: RankingModel;
  live: LiveRanking;
  sheet: Sheet;
  whose: WeightsOf;
  viewer: Viewer;
}

export interface RankingView {
  /** `view` in the address. */
  value: string;
  name: string;
  /** Shown only where there are ranks; without them the screen says what is missing. */
  needsRanks: boolean;
  load: () => Promise<{ default: ComponentType<RankingViewProps> }>;
}

/** The ranking itself: no `view` in the address. */
export const GRID = 'grid';

/** Every other view, in the order of the tabs; each one's code is fetched when it is first opened. */
export const VIEWS: readonly RankingView[] = [
  {
    value: 'compare',
    name: 'Compare',
    needsRanks: true,
    load: () => import('./compare/CompareView.tsx'),
  },
  {
    value: 'holds',
    name: 'Does it hold',
    needsRanks: true,
    load: () => import('./holds/HoldsView.tsx'),
  },
  {
    value: 'acceptability',
    name: 'Rank acceptability',
    needsRanks: true,
    load: () => import('./acceptability/AcceptabilityView.tsx'),
  },
  {
    value: 'agreement',
    name: 'Agreement',
    needsRanks: false,
    load: () => import('../agreement/AgreementView.tsx'),
  },
  {
    value: 'what-if',
    name: 'What-if',
    needsRanks: false,
    load: () => import('../what-if/WhatIfView.tsx'),
  },
  {
    value: 'figures',
    name: 'Figures',
    needsRanks: false,
    load: () => import('../figures/FiguresView.tsx'),
  },
];

/** The view an address asks for; the ranking itself where it asks for none that exists. */
export const viewOf = (param: string | null): RankingView | undefined =>
  VIEWS.find(({ value }) => value === param);

import { lazy, Suspense, type ComponentType, type ReactNode } from 'react';
import { Tabs } from '#components/ui/Tabs.tsx';
import { BeforeRanks } from './Notices.tsx';
import { GRID, VIEWS, viewOf, type RankingView, type RankingViewProps } from './views.ts';

const LOADED = new Map(VIEWS.map((view) => [view.value, lazy(view.load)]));

const TABS = [{ value: GRID, name: 'Ranking' }, ...VIEWS.map(({ value, name }) => ({ value, name }))];

interface RankingViewsProps extends Omit<RankingViewProps, 'model'> {
  /** `view` in the address, and how to set it. */
  param: string | null;
  onView: (view: string | null) => void;
  /** Gives every criterion the same points; undefined where this person may not. */
  onEven: (() => void) | undefined;
  /** What stands over every view but the ranking itself, which has it among its own tools. */
  bar: ReactNode;
  /** The ranking itself. */
  children: ReactNode;
}

/** The views of a ranking under their tabs. */
export function RankingViews({ param, onView, onEven, bar, children, ...shown }: RankingViewsProps) {
  const view = viewOf(param);
  return (
    <Tabs
      label="Views of the ranking"
      tabs={TABS}
      value={view?.value ?? GRID}
      onChange={(value) => onView(value === GRID ? null : value)}
    >
      <div className="rk-view">
        {view && <div className="rk-bar">{bar}</div>}
        {view ? <OneView view={view} onEven={onEven} {...shown} /> : children}
      </div>
    </Tabs>
  );
}

interface OneViewProps extends Omit<RankingViewProps, 'model'> {
  view: RankingView;
  onEven: (() => void) | undefined;
}

function OneView({ view, onEven, ...shown }: OneViewProps) {
  const { model, ranking } = shown.live;
  if (view.needsRanks && ranking.state !== 'ranked')
    return <BeforeRanks state={ranking.state} studyId={shown.studyId} onEven={onEven} />;
  const View = LOADED.get(view.value) as ComponentType<RankingViewProps>;
  const wait = <p className="caption">Reading figures.</p>;
  if (!model) return wait;
  return (
    <Suspense fallback={wait}>
      <View model={model} {...shown} />
    </Suspense>
  );
}

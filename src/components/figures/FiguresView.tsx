import { useMemo } from 'react';
import type { RankingViewProps } from '#components/ranking/views.ts';
import { useAddressParam } from '#components/live/address.ts';
import { Segmented } from '#components/ui/Segmented.tsx';
import { EmptyState } from '#components/ui/States.tsx';
import { FiguresTable } from './FiguresTable.tsx';
import { enteredLines, hasSource, sourceCount } from './known.ts';
import { figureLockOf } from './lock.ts';
import { useFigureDesk } from './use-figure-desk.tsx';

const addressed = (): string | null => new URLSearchParams(window.location.search).get('source');

/** Every entered figure with what it rests on; those without a source are counted and can be looked at alone. */
export default function FiguresView({ studyId, model, live, viewer }: RankingViewProps) {
  const [source, setSource] = useAddressParam('source', addressed());
  const lines = useMemo(() => enteredLines(model.figures), [model.figures]);
  const shown = source === 'none' ? lines.filter((line) => !hasSource(line)) : lines;
  const { desk, sheet } = useFigureDesk(studyId, live, figureLockOf(viewer));
  return (
    <>
      <div className="fig-bar">
        <Segmented
          legend="Figures shown"
          value={source === 'none' ? 'none' : 'all'}
          onChange={(value) => setSource(value === 'none' ? 'none' : null)}
          segments={[
            { value: 'all', name: 'All' },
            { value: 'none', name: 'Without a source' },
          ]}
        />
        <p role="status">{sourceCount(lines)}</p>
      </div>
      {shown.length > 0 ? (
        <FiguresTable lines={shown} decimals={model.decimals} onOpen={desk.onOpen} />
      ) : (
        <EmptyState fact={lines.length === 0 ? 'No figures are entered yet.' : 'Every figure has a source.'}>
          {lines.length === 0
            ? 'Type them in the ranking’s grid or in a site’s details, or upload a CSV with a column for each criterion.'
            : 'Choose All to see them.'}
        </EmptyState>
      )}
      {sheet}
    </>
  );
}

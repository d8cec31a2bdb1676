import { useMemo } from 'react';
import type { RankingFigures } from '#contract/ranking.ts';
import { enteredLines, hasSource, sourceCount } from './known.ts';

/** How many entered figures have no source, with the way to see them; nothing where none is entered. */
export function SourceNote({ studyId, figures }: { studyId: string; figures: RankingFigures }) {
  const lines = useMemo(() => enteredLines(figures), [figures]);
  if (lines.length === 0) return null;
  const filter = lines.every(hasSource) ? '' : '&source=none';
  return (
    <p className="caption">
      {sourceCount(lines)}{' '}
      <a className="underline" href={`/studies/${studyId}/ranking?view=figures${filter}`}>
        {filter === '' ? 'See the figures' : 'See them'}
      </a>
    </p>
  );
}

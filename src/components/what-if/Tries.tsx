import { Panel } from '#components/ui/Finding.tsx';
import type { RankingFigures } from '#contract/ranking.ts';
import type { WhatIfChanges } from '#contract/what-if.ts';
import { change } from './draft.ts';
import { LeaveOut } from './LeaveOut.tsx';
import { TryFigure } from './TryFigure.tsx';
import { TryLimit } from './TryLimit.tsx';
import type { LiveWhatIf } from './use-what-if.ts';

interface TriesProps {
  figures: RankingFigures;
  changes: WhatIfChanges;
  step: LiveWhatIf['step'];
}

/** The other things that can be tried: a figure, a limit, a ranking without a site. */
export function Tries({ figures, changes, step }: TriesProps) {
  const left = new Set(changes.leftOut);
  return (
    <>
      <Panel title="Try a figure">
        <TryFigure
          figures={figures}
          onTry={({ site, criterion, value }) =>
            step(
              { key: `figure ${site.siteId} ${criterion.id}`, label: `${criterion.name} of ${site.name}` },
              change.figure(changes, { siteId: site.siteId, criterionId: criterion.id, value }),
            )
          }
        />
      </Panel>
      <Panel title="Try a limit">
        <TryLimit
          criteria={figures.criteria}
          onTry={(criterion, limit) =>
            step(
              { key: `limit ${criterion.id}`, label: `limit of ${criterion.name}` },
              change.limit(changes, criterion.id, limit),
            )
          }
        />
      </Panel>
      <Panel title="Leave a site out">
        <LeaveOut
          sites={figures.sites.filter(({ siteId }) => !left.has(siteId))}
          onLeaveOut={(site) =>
            step(
              { key: `site ${site.siteId}`, label: `leaving out ${site.name}` },
              change.leaveOut(changes, site.siteId),
            )
          }
        />
      </Panel>
    </>
  );
}

import { useState } from 'react';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { TornadoBarOf, TornadoOf } from '#contract/sensitivity.ts';
import type { Subject } from '#contract/sensitivity-subject.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { EmptyState } from '#components/ui/States.tsx';
import type { Sheet } from '../columns.ts';
import { TornadoChart } from './TornadoChart.tsx';
import { TornadoTable } from './TornadoTable.tsx';

const STEP = 12;

interface TornadoProps {
  studyId: string;
  tornado: TornadoOf | null;
  subject: Subject;
  names: Names;
  sheet: Sheet;
}

/** The leader's margin with every uncertain figure at its low and at its high, one at a time. */
export function Tornado({ studyId, tornado, subject, names, sheet }: TornadoProps) {
  const [shown, setShown] = useState(STEP);
  const bars = tornado?.bars ?? [];
  if (!tornado || bars.length === 0) {
    return (
      <Panel title="One figure at a time">
        <EmptyState
          fact="No figure has a low and a high."
          actions={<ButtonLink href={`/studies/${studyId}/ranking?view=figures`}>Open Figures</ButtonLink>}
        >
          Enter a low and a high beside a figure of a ranked site, in the grid or from CSV columns named x_low
          and x_high. This chart then shows which of them could cost the lead.
        </EmptyState>
      </Panel>
    );
  }
  const moving = bars.filter(({ atLow, atHigh }) => atLow !== tornado.margin || atHigh !== tornado.margin);
  const still = bars.length - moving.length;
  const leader = subject.sites[0]?.name ?? '';
  return (
    <Panel title={findingOf(moving, leader)} caption={captionOf(leader, still)}>
      {moving.length > 0 && (
        <TornadoChart
          tornado={{ margin: tornado.margin, bars: moving.slice(0, shown) }}
          names={names}
          sheet={sheet}
          table={<TornadoTable tornado={tornado} names={names} sheet={sheet} />}
        />
      )}
      {shown < moving.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 2 * STEP)}>
            Show {formatNumber(Math.min(2 * STEP, moving.length - shown))} more of{' '}
            {formatNumber(moving.length)} figures
          </Button>
        </p>
      )}
    </Panel>
  );
}

const loses = ({ atLow, atHigh }: TornadoBarOf): boolean => atLow < 0 || atHigh < 0;

function findingOf(bars: readonly TornadoBarOf[], leader: string): string {
  const lost = bars.filter(loses).length;
  if (lost === 0) return `No figure alone costs ${leader} the lead`;
  return `${formatCount(lost, 'figure')} alone can cost ${leader} the lead`;
}

function captionOf(leader: string, still: number): string {
  const rest =
    still > 0
      ? ` ${formatCount(still, 'figure moves', 'figures move')} nothing and ${still === 1 ? 'stands' : 'stand'} in the table alone.`
      : '';
  return `${leader}’s margin over the best other site with each uncertain figure at its low (open) and high (filled), the widest first.${rest}`;
}

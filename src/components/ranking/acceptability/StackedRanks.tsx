import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { shareInWords } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Chart, partPaint, XAxis } from '#components/ui/chart.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { shortened } from '../holds/shorten.ts';
import { PATTERNS } from '../ValueBar.tsx';

const WIDTH = 640;
const LEFT = 190;
const RIGHT = WIDTH - 14;
const TOP = 26;
const ROW = 30;
const BAR = 18;
const NAME_LENGTH = 27;
const STEP = 20;
/** A number needs this much of a part to stand on it. */
const NUMBERED = 14;
const TICKS = [0, 25, 50, 75, 100];

const at = (percent: number): number => LEFT + (percent / 100) * (RIGHT - LEFT);

/** Each site's ranks as one bar, from the first rank on. */
export function StackedRanks({ answer, names }: { answer: AcceptabilityOf; names: Names }) {
  const [shown, setShown] = useState(STEP);
  const { sites, samples } = answer;
  const rows = sites.slice(0, shown);
  const bottom = TOP + rows.length * ROW;
  const first = rows.map(
    (site) => `${names.site(site.siteId)} ${shareInWords(site.shares[0] ?? 0, samples)}`,
  );
  return (
    <Panel
      title="How the ranks spread"
      caption="From the left: percent of draws at rank 1, 2, and so on; where there is room a part carries its rank. The matrix above has every figure."
    >
      <Chart label={`At rank 1: ${first.join(', ')}.`} width={WIDTH} height={bottom + 6}>
        <XAxis ticks={TICKS} at={at} from={TOP - 6} to={bottom} labelY={TOP - 12} />
        {rows.map((site, place) => (
          <g key={site.siteId}>
            <text x="0" y={TOP + place * ROW + 18} className={place === 0 ? 'signal-text' : undefined}>
              {shortened(names.site(site.siteId), NAME_LENGTH)}
            </text>
            {partsOf(site.shares).map(({ rank, from, to }) => (
              <g key={rank}>
                <rect
                  x={at(from * 100) + 0.5}
                  y={TOP + place * ROW + (ROW - BAR) / 2 - 1}
                  width={Math.max(at(to * 100) - at(from * 100) - 1, 0.4)}
                  height={BAR}
                  {...(place === 0 && rank === 0 ? { className: 'fill-signal' } : partPaint(rank, PATTERNS))}
                />
                {at(to * 100) - at(from * 100) >= NUMBERED && (
                  <text
                    className="halo figure sv-rank-number"
                    x={at((from + to) * 50)}
                    y={TOP + place * ROW + 18}
                    textAnchor="middle"
                    aria-hidden="true"
                  >
                    {rank + 1}
                  </text>
                )}
              </g>
            ))}
          </g>
        ))}
      </Chart>
      {shown < sites.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 2 * STEP)}>
            Show {formatNumber(Math.min(2 * STEP, sites.length - shown))} more of {formatNumber(sites.length)}{' '}
            sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

/** Parts of a bar, those that no draw showed left out. */
function partsOf(shares: readonly number[]): { rank: number; from: number; to: number }[] {
  let from = 0;
  return shares.flatMap((share, rank) => {
    if (share === 0) return [];
    const part = { rank, from, to: from + share };
    from += share;
    return [part];
  });
}

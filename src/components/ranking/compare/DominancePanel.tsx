import { useMemo, useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import { dominanceOf } from '#contract/sensitivity-model.ts';
import type { Subject } from '#contract/sensitivity-subject.ts';
import { dominanceInWords, type Names } from '#contract/sensitivity-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';

const STEP = 12;

/** Which ranked sites another outdoes everywhere, each with one that does. */
export function DominancePanel({ subject, names }: { subject: Subject; names: Names }) {
  const [shown, setShown] = useState(STEP);
  const dominance = useMemo(() => dominanceOf(subject), [subject]);
  const { fact, behind } = dominanceInWords(dominance);
  const { dominated } = dominance;
  return (
    <Panel title={fact} caption={behind}>
      {dominated.length > 0 && (
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Dominated site</th>
              <th scope="col">By</th>
            </tr>
          </thead>
          <tbody>
            {dominated.slice(0, shown).map(({ siteId, by }) => (
              <tr key={siteId}>
                <th scope="row">{names.site(siteId)}</th>
                <td>{names.site(by)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {shown < dominated.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 5 * STEP)}>
            Show {formatNumber(Math.min(5 * STEP, dominated.length - shown))} more of{' '}
            {formatNumber(dominated.length)} dominated sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

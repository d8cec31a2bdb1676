import { Button } from '#components/ui/Button.tsx';
import { EmptyState, Notice, Tag } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { formatDateTimeUtc, formatNumber, listInWords } from '#contract/format.ts';
import type { WhatIf, WhatIfChanges } from '#contract/what-if.ts';
import type { LiveWhatIf } from './use-what-if.ts';

interface WhatIfListProps {
  live: LiveWhatIf;
  onOpen: (whatIf: WhatIf) => void;
}

/** A person's own what-ifs and those others share. */
export function WhatIfList({ live, onOpen }: WhatIfListProps) {
  const { list, listError, kept, readAgain } = live;
  if (listError)
    return (
      <Notice
        fact="The what-ifs could not be read"
        requestId={listError.requestId}
        actions={
          <Button size="small" icon="again" onClick={() => void readAgain()}>
            Read them again
          </Button>
        }
      >
        {listError.message} What is tried here is kept.
      </Notice>
    );
  if (!list) return <p className="caption">Reading what-ifs.</p>;
  if (list.items.length === 0)
    return (
      <EmptyState fact="No what-ifs kept yet.">
        Try a change above, give it a name and save it. Yours stay private until you share them.
      </EmptyState>
    );
  return (
    <>
      <TableScroll label="What-ifs kept">
        <table className="wi-list table">
          <thead>
            <tr>
              <th scope="col">Name</th>
              <th scope="col">By</th>
              <th scope="col">Seen by</th>
              <th scope="col">Tries</th>
              <th scope="col">Changed</th>
            </tr>
          </thead>
          <tbody>
            {list.items.map((one) => (
              <tr key={one.id} aria-selected={one.id === kept?.id || undefined}>
                <th scope="row">
                  <button type="button" className="wi-open" onClick={() => onOpen(one)}>
                    {one.name}
                  </button>
                  {one.id === kept?.id && <span className="sub">shown above</span>}
                </th>
                <td>{one.mine ? 'you' : one.by.name}</td>
                <td>
                  <Tag>{one.shared ? 'Shared' : 'You alone'}</Tag>
                </td>
                <td>{triesInWords(one.changes)}</td>
                <td className="num wi-when">{formatDateTimeUtc(one.updatedAt)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {list.items.length < list.total && (
        <p className="caption mt-2">
          The {formatNumber(list.items.length)} changed last of {formatNumber(list.total)}.
        </p>
      )}
    </>
  );
}

/** "weights, 2 limits and 1 site left out" */
export function triesInWords({ weights, limits, figures, leftOut }: WhatIfChanges): string {
  const count = (n: number, one: string, many: string): string[] =>
    n === 0 ? [] : [`${formatNumber(n)} ${n === 1 ? one : many}`];
  const parts = [
    ...(weights ? ['weights'] : []),
    ...count(Object.keys(limits).length, 'limit', 'limits'),
    ...count(figures.length, 'figure', 'figures'),
    ...count(leftOut.length, 'site left out', 'sites left out'),
  ];
  return parts.length === 0 ? 'nothing' : listInWords(parts);
}

import type { WhatIf } from '#contract/what-if.ts';
import type { RecordEntry } from '#server/change-study.ts';

/** What the study's members may see of a what-if; undefined where it is its maker's alone. */
const shownOf = (whatIf: WhatIf | null) =>
  whatIf?.shared ? { name: whatIf.name, changes: whatIf.changes } : undefined;

/**
 * A line of the record for a what-if made, changed or let go. The record is read by every member: while a what-if is
 * private nothing of it is written there, and a private one alone writes no line.
 */
export function entriesFor(before: WhatIf | null, after: WhatIf | null): RecordEntry[] {
  const objectId = (after ?? before)?.id ?? '';
  const from = shownOf(before);
  const to = shownOf(after);
  if (from && to) {
    const same = JSON.stringify(from) === JSON.stringify(to);
    return same ? [] : [{ object: 'what-if', objectId, action: 'change', from, to }];
  }
  if (to) return [{ object: 'what-if', objectId, action: 'share', to }];
  if (from) return [{ object: 'what-if', objectId, action: after ? 'unshare' : 'remove', from }];
  return [];
}

import { Conflict } from '#components/ui/Conflict.tsx';
import type { Criterion } from '#contract/criterion.ts';
import type { ChangedSite, SitePatch } from '#contract/site.ts';
import { CELL_NAMES, CELLS, cellText } from './read-site.ts';

interface DetailsConflictProps {
  patch: SitePatch;
  current: ChangedSite;
  criteria: readonly Criterion[];
  onKeepTheirs: () => void;
  onPutYours: () => void;
}

/** The fields of the patch, as they are in one version of the site: "Latitude −4.7218; Notes by the river". */
function inWords(site: ChangedSite, patch: SitePatch, criteria: readonly Criterion[]): string {
  const cells = CELLS.filter((key) => patch[key] !== undefined).map(
    (key) => `${CELL_NAMES[key]} ${cellText(site, key) || 'all round'}`,
  );
  const notes = patch.notes === undefined ? [] : [`Notes ${site.notes || 'empty'}`];
  const figures = criteria
    .filter(({ id }) => patch.values && id in patch.values)
    .map(({ id, name }) => `${name} ${site.values[id] ?? 'no figure'}`);
  return [...cells, ...notes, ...figures].join('; ');
}

/** A stale save of a site's details: the fields that were to change, yours and theirs. */
export function DetailsConflict({ patch, current, criteria, ...choose }: DetailsConflictProps) {
  const values = Object.entries({ ...current.values, ...patch.values });
  const yours = {
    ...current,
    ...patch,
    version: current.version,
    particulars: current.particulars,
    values: Object.fromEntries(
      values.filter((entry): entry is [string, string | number] => entry[1] !== null),
    ),
  };
  return (
    <Conflict
      what={current.name}
      yours={inWords(yours, patch, criteria)}
      theirs={inWords(current, patch, criteria)}
      by={current.changedBy ?? undefined}
      at={current.changedAt ?? undefined}
      keepTheirs="Keep theirs"
      putYours="Put yours"
      {...choose}
    />
  );
}

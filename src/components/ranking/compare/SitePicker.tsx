import { useMemo } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import { Select } from '#components/ui/Field.tsx';
import { IconButton } from '#components/ui/Button.tsx';
import type { Listed } from '#core/decision/listing.ts';

interface SitePickerProps {
  label: string;
  model: RankingModel;
  /** Code of the site chosen. */
  value: string;
  /** Codes chosen here or in another picker. */
  taken: readonly string[];
  onChoose: (code: string) => void;
  /** Takes the site out again; undefined where it must stay. */
  onLeave?: (() => void) | undefined;
}

/** A site of the list, by rank and name. */
export function SitePicker({ label, model, value, taken, onChoose, onLeave }: SitePickerProps) {
  const choices = useMemo(
    () =>
      model.rows.flatMap((listed) => {
        const site = model.figures.sites[listed.site];
        return site ? [{ value: site.code, name: `${standing(listed)} ${site.name}` }] : [];
      }),
    [model],
  );
  const own = choices.find((choice) => choice.value === value);
  return (
    <span className="sv-pick">
      <Select
        label={label}
        choices={choices.filter((choice) => choice.value === value || !taken.includes(choice.value))}
        value={value}
        onChange={(event) => onChoose(event.target.value)}
      />
      {onLeave && <IconButton icon="remove" label={`Take out ${own?.name ?? value}`} onClick={onLeave} />}
    </span>
  );
}

function standing(listed: Listed): string {
  if (listed.kind === 'ranked') return `${formatNumber(listed.rank)}.`;
  return listed.kind === 'incomplete' ? 'Incomplete:' : 'Set aside:';
}

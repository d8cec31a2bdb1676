import { Icon, type IconName } from '#components/ui/Icon.tsx';
import { formatNumber } from '#contract/format.ts';
import type { Column } from '#core/csv/columns.ts';
import type { SiteField } from '#core/csv/headings.ts';
import type { Row } from '#core/csv/outcomes.ts';
import { stateOf, type RowState } from './row-filter.ts';
import { STATE_WORDS } from './words.ts';

const ICONS: Readonly<Record<RowState, IconName>> = {
  refused: 'refused',
  changed: 'edit',
  warned: 'find',
  duplicate: 'copy',
  accepted: 'done',
};

interface UploadRowProps {
  row: Row;
  columns: readonly Column[];
  chosen: boolean;
  onChoose: (chosen: boolean) => void;
}

/** One row: its line, outcome, where the site lies and why it stands so. */
export function UploadRow({ row, columns, chosen, onChoose }: UploadRowProps) {
  const state = stateOf(row);
  const { line, site, reasons } = row;
  const refused = state === 'refused';
  /** A figure at fault is shown as it stands in the file. */
  const cell = (field: SiteField, text: string) => {
    const fault = reasons.some((reason) => reason.severity === 'refusal' && reason.field === field);
    const column = columns.find((one) => one.field === field);
    if (!fault || !column) return text;
    return <span className="at-fault">{row.cells[column.index]?.trim() || 'empty'}</span>;
  };
  return (
    <tr data-refused={refused ? '' : undefined} data-changed={state === 'changed' ? '' : undefined}>
      <td className="upload-tick">
        {!refused && (
          <input
            type="checkbox"
            aria-label={`Choose line ${line}, ${site.name}`}
            checked={chosen}
            onChange={(event) => onChoose(event.target.checked)}
          />
        )}
      </td>
      <td className="num">{formatNumber(line)}</td>
      <td>
        <span className="upload-state">
          <Icon name={ICONS[state]} />
          {STATE_WORDS[state]}
        </span>
      </td>
      <td className="upload-code">{cell('code', site.code ?? '')}</td>
      <td className="upload-name">{cell('name', site.name)}</td>
      <td className="num">{cell('latitudeDeg', degrees(site.latitudeDeg))}</td>
      <td className="num">{cell('longitudeDeg', degrees(site.longitudeDeg))}</td>
      <td className="upload-reasons">
        {reasons.map((reason) => (
          <p key={`${reason.code} ${reason.field ?? ''}`}>{reason.message}</p>
        ))}
      </td>
    </tr>
  );
}

function degrees(value: number | null): string {
  return value === null ? '' : formatNumber(value, 4);
}

import { Select } from '#components/ui/Field.tsx';
import type { Column } from '#core/csv/columns.ts';
import { ENCODINGS, type Encoding } from '#core/csv/encoding.ts';
import { COLUMN_FIELDS, type ColumnField } from '#core/csv/headings.ts';
import { DELIMITERS, type Delimiter } from '#core/csv/tokenise.ts';
import { chooseField, type Choices } from './choices.ts';
import { criterionWords, DELIMITER_NAMES, ENCODING_NAMES, FIELD_NAMES, unitOf } from './words.ts';

interface ColumnMatchProps {
  columns: readonly Column[];
  /** What was found, where the file could be read. */
  found?: { delimiter: Delimiter; encoding: Encoding } | undefined;
  choices: Choices;
  onChoose: (choices: Choices) => void;
}

/** Each column of the file and what it is read as, which can be changed; the rows are then read again. */
export function ColumnMatch({ columns, found, choices, onChoose }: ColumnMatchProps) {
  return (
    <div className="upload-match">
      {columns.length > 0 && (
        <table className="table" aria-label="Columns of the file">
          <thead>
            <tr>
              <th scope="col">Column in file</th>
              <th scope="col">Read as</th>
              <th scope="col">Unit</th>
            </tr>
          </thead>
          <tbody>
            {columns.map((column) => (
              <ColumnRow
                key={column.index}
                column={column}
                onChoose={(field) => onChoose(chooseField(choices, column, field))}
              />
            ))}
          </tbody>
        </table>
      )}
      <div className="upload-format">
        <Select
          label="Separator"
          value={choices.delimiter ?? ''}
          choices={[
            {
              value: '',
              name: found ? `Found: ${DELIMITER_NAMES[found.delimiter].toLowerCase()}` : 'Find it',
            },
            ...DELIMITERS.map((value) => ({ value, name: DELIMITER_NAMES[value] })),
          ]}
          onChange={({ target: { value } }) =>
            onChoose({ ...choices, delimiter: DELIMITERS.find((one) => one === value) })
          }
        />
        <Select
          label="Encoding"
          value={choices.encoding ?? ''}
          choices={[
            { value: '', name: found ? `Found: ${ENCODING_NAMES[found.encoding]}` : 'Find it' },
            ...ENCODINGS.map((value) => ({ value, name: ENCODING_NAMES[value] })),
          ]}
          onChange={({ target: { value } }) =>
            onChoose({ ...choices, encoding: ENCODINGS.find((one) => one === value) })
          }
        />
      </div>
    </div>
  );
}

function ColumnRow({ column, onChoose }: { column: Column; onChoose: (field: ColumnField) => void }) {
  const { heading, index, field, criterion } = column;
  const title = heading || `Column ${index + 1}`;
  return (
    <tr data-set-aside={field === 'unused' ? '' : undefined}>
      <th scope="row" className="num upload-heading">
        {title}
      </th>
      <td>
        <Select
          label={`${title} is read as`}
          labelHidden
          value={field}
          choices={COLUMN_FIELDS.map((value) => ({ value, name: FIELD_NAMES[value] }))}
          onChange={({ target: { value } }) => {
            const chosen = COLUMN_FIELDS.find((one) => one === value);
            if (chosen) onChoose(chosen);
          }}
        />
        {criterion !== null && <span className="sub">{criterionWords(column)}</span>}
      </td>
      <td className="upload-unit">{unitOf(column)}</td>
    </tr>
  );
}

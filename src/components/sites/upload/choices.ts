import type { Column, ColumnChoice } from '#core/csv/columns.ts';
import type { Encoding } from '#core/csv/encoding.ts';
import type { ColumnField } from '#core/csv/headings.ts';
import type { Delimiter } from '#core/csv/tokenise.ts';

/** What a person has changed of what was recognised. */
export interface Choices {
  fields: ReadonlyMap<number, ColumnField>;
  delimiter: Delimiter | undefined;
  encoding: Encoding | undefined;
}

export const NO_CHOICES: Choices = { fields: new Map(), delimiter: undefined, encoding: undefined };

/** A column's field chosen; a site's field belongs to one column, so it is taken from another that was given it. */
export function chooseField(choices: Choices, column: Column, field: ColumnField): Choices {
  const fields = new Map(choices.fields);
  if (field !== 'criterion' && field !== 'unused') {
    for (const [index, chosen] of fields) if (chosen === field) fields.set(index, 'unused');
  }
  fields.set(column.index, field);
  return { ...choices, fields };
}

export function columnChoices({ fields }: Choices): ColumnChoice[] {
  return [...fields].map(([column, field]) => ({ column, field }));
}

/** The choices as the form of an upload carries them. */
export function appendChoices(form: FormData, choices: Choices): void {
  if (choices.fields.size > 0) {
    const columns = [...choices.fields].map(([index, field]) => ({ index, field }));
    form.set('columns', JSON.stringify(columns));
  }
  if (choices.delimiter !== undefined) form.set('delimiter', choices.delimiter);
  if (choices.encoding !== undefined) form.set('encoding', choices.encoding);
}

import type { SiteField } from './headings.ts';

/** Every reason a row can carry. */
export type ReasonCode =
  | 'empty'
  | 'not-a-number'
  | 'out-of-range'
  | 'hemisphere'
  | 'too-long'
  | 'code-malformed'
  | 'code-taken'
  | 'sector'
  | 'text-figure'
  | 'low-high'
  | 'duplicate-in-file'
  | 'duplicate'
  | 'too-many-columns'
  | 'too-few-columns'
  | 'unclosed-quote'
  | 'near'
  | 'swapped'
  | 'longitude-brought-in';

/** Whether a reason refuses its row, warns of something in it, tells what was changed, or only informs. */
export type Severity = 'refusal' | 'warning' | 'change' | 'note';

/** Why a row stands as it does. `field` is a site's key, a criterion's name, or null for the whole row. */
export interface Reason {
  readonly code: ReasonCode;
  readonly severity: Severity;
  readonly message: string;
  readonly field: string | null;
}

type Field = SiteField | (string & {}) | null;

export const refusal = (code: ReasonCode, field: Field, message: string): Reason => ({
  code,
  severity: 'refusal',
  message,
  field,
});
export const warning = (code: ReasonCode, field: Field, message: string): Reason => ({
  code,
  severity: 'warning',
  message,
  field,
});
export const change = (code: ReasonCode, field: Field, message: string): Reason => ({
  code,
  severity: 'change',
  message,
  field,
});
export const note = (code: ReasonCode, field: Field, message: string): Reason => ({
  code,
  severity: 'note',
  message,
  field,
});

import type { EvidenceType } from '#contract/evidence.ts';
import { detectDelimiter, isBlank, isSeparatorLine } from '#core/csv/delimiter.ts';
import { decode } from '#core/csv/encoding.ts';
import { tokenise } from '#core/csv/tokenise.ts';

const ascii = (text: string): number[] => [...text].map((letter) => letter.charCodeAt(0));

/** First bytes by kind; a blank stands for any byte. */
const SIGNATURES: readonly (readonly [EvidenceType, readonly (number | null)[]])[] = [
  ['application/pdf', ascii('%PDF-')],
  ['image/png', [0x89, ...ascii('PNG'), 0x0d, 0x0a, 0x1a, 0x0a]],
  ['image/jpeg', [0xff, 0xd8, 0xff]],
  ['image/webp', [...ascii('RIFF'), null, null, null, null, ...ascii('WEBP')]],
];

/**
 * Tells what a file is from its bytes alone; its name and what the sender calls it count for nothing.
 *
 * @returns the kind; undefined for anything that is not kept, markup and empty files among it
 * @see ISO 32000-1, 7.5.2 (PDF) · PNG (W3C), 5.2 · ITU-T T.81, B.1.1.3 (JPEG) · RFC 9649, 2.3 (WebP) · RFC 4180 (CSV)
 */
export function kindOfFile(bytes: Uint8Array): EvidenceType | undefined {
  const signed = SIGNATURES.find(([, signature]) =>
    signature.every((byte, at) => (byte === null ? at < bytes.length : bytes[at] === byte)),
  );
  return signed?.[0] ?? (isTable(bytes) ? 'text/csv' : undefined);
}

/** Text of a heading and at least one row, as wide as the heading, in more than one column, and no markup. */
function isTable(bytes: Uint8Array): boolean {
  if (bytes.byteLength === 0) return false;
  const decoded = decode(bytes);
  if (decoded.kind === 'refused' || /^\s*</.test(decoded.text)) return false;
  const delimiter = detectDelimiter(decoded.text);
  const records = tokenise(decoded.text, delimiter).filter(
    (record) => !isBlank(record) && !isSeparatorLine(record),
  );
  const width = records[0]?.cells.length ?? 0;
  return (
    records.length > 1 &&
    width > 1 &&
    records.every(({ cells, unclosed }) => !unclosed && cells.length === width)
  );
}

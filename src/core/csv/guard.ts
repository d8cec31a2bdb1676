/** Characters that make a spreadsheet take a cell for a formula, or hide one from sight. */
const DANGEROUS = /^'*[=+\-@\t\r]/;

/**
 * Makes a text harmless for spreadsheets: what would be taken for a formula gets an apostrophe in front, by which
 * spreadsheets themselves mark text. One apostrophe more where the text already has some, so that none is lost.
 *
 * @see OWASP, "CSV Injection", for the characters
 */
export function addGuard(text: string): string {
  return DANGEROUS.test(text) ? `'${text}` : text;
}

/** Takes one guarding apostrophe off again: stripGuard(addGuard(text)) is text. */
export function stripGuard(text: string): string {
  return text.startsWith("'") && DANGEROUS.test(text.slice(1)) ? text.slice(1) : text;
}

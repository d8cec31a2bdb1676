import { UploadOptions } from '#contract/upload.ts';
import { MAX_FILE_BYTES } from '#core/csv/limits.ts';
import { readPostedForm } from '#server/posted-file.ts';

/** A file posted with a form, and what the form says about reading it. */
export interface PostedFile {
  fileName: string;
  bytes: Uint8Array;
  options: UploadOptions;
}

/**
 * Reads a posted form, stopping where it grows larger than a file may be.
 * @throws AppError 'too-large' · 'invalid', ZodError
 */
export async function readPostedFile(request: Request): Promise<PostedFile> {
  const limits = { mostBytes: MAX_FILE_BYTES, mostInWords: '5 MB', unnamed: 'sites.csv' };
  const { form, ...file } = await readPostedForm(request, limits);
  return { ...file, options: UploadOptions.parse(textFields(form)) };
}

/** The form's other fields; one left empty counts as left out. */
function textFields(form: FormData): Record<string, string> {
  const fields = ['columns', 'delimiter', 'encoding'].map((name) => [name, form.get(name)] as const);
  return Object.fromEntries(
    fields.filter((field): field is [string, string] => typeof field[1] === 'string' && field[1] !== ''),
  );
}

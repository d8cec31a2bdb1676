import { UploadOptions } from '#contract/upload.ts';
import { MAX_FILE_BYTES } from '#core/csv/limits.ts';
import { AppError } from '#server/errors.ts';

/** A file posted with a form, and what the form says about reading it. */
export interface PostedFile {
  fileName: string;
  bytes: Uint8Array;
  options: UploadOptions;
}

/** What a form may weigh beside its file: boundaries and a changed match of columns. */
const FORM_BYTES = 256 * 1024;
const MAX_NAME = 200;

const tooLarge = (): AppError => new AppError('too-large', 'The file is larger than 5 MB. Nothing was kept.');

/**
 * Reads a posted form, stopping where it grows larger than a file may be.
 * @throws AppError 'too-large' · 'invalid', ZodError
 */
export async function readPostedFile(request: Request): Promise<PostedFile> {
  const body = await readCapped(request, MAX_FILE_BYTES + FORM_BYTES);
  const form = await parseForm(body, request.headers.get('content-type') ?? '');
  const file = form.get('file');
  if (!(file instanceof File)) {
    const message = 'Post the file as multipart/form-data in the field “file”.';
    throw new AppError('invalid', `${message} Nothing was kept.`, { errors: [{ path: 'file', message }] });
  }
  if (file.size > MAX_FILE_BYTES) throw tooLarge();
  const options = UploadOptions.parse(textFields(form));
  return { fileName: baseName(file.name), bytes: new Uint8Array(await file.arrayBuffer()), options };
}

async function readCapped(request: Request, limit: number): Promise<Uint8Array<ArrayBuffer>> {
  if (Number(request.headers.get('content-length') ?? 0) > limit) throw tooLarge();
  const parts: Uint8Array[] = [];
  let length = 0;
  const reader = request.body?.getReader();
  for (let part = await reader?.read(); part?.value; part = await reader?.read()) {
    length += part.value.byteLength;
    if (length > limit) {
      await reader?.cancel();
      throw tooLarge();
    }
    parts.push(part.value);
  }
  const whole = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.byteLength;
  }
  return whole;
}

async function parseForm(body: Uint8Array<ArrayBuffer>, type: string): Promise<FormData> {
  try {
    return await new Response(body, { headers: { 'content-type': type } }).formData();
  } catch (cause) {
    const message = 'The body is not a multipart/form-data form.';
    throw new AppError('invalid', `${message} Nothing was kept.`, {
      cause,
      errors: [{ path: 'file', message }],
    });
  }
}

/** The form's other fields; one left empty counts as left out. */
function textFields(form: FormData): Record<string, string> {
  const fields = ['columns', 'delimiter', 'encoding'].map((name) => [name, form.get(name)] as const);
  return Object.fromEntries(
    fields.filter((field): field is [string, string] => typeof field[1] === 'string' && field[1] !== ''),
  );
}

/** The name without any path or control characters, as it is shown and given back. */
function baseName(name: string): string {
  const base = (name.split(/[\\/]/).at(-1) ?? '').replace(/\p{Cc}/gu, '').trim();
  return base === '' ? 'sites.csv' : [...base].slice(0, MAX_NAME).join('');
}

import { AppError } from '#server/errors.ts';

/** A form with one file in its field `file`. */
export interface PostedForm {
  fileName: string;
  bytes: Uint8Array;
  /** The form's other fields. */
  form: FormData;
}

/** What a form may weigh beside its file: boundaries and its other fields. */
const FORM_BYTES = 256 * 1024;
const MAX_NAME = 200;

interface Limits {
  mostBytes: number;
  /** "5 MB" */
  mostInWords: string;
  /** What a file without a name is called. */
  unnamed: string;
}

/**
 * Reads a posted form, stopping where it grows larger than its file may be.
 * @throws AppError 'too-large' · 'invalid'
 */
export async function readPostedForm(
  request: Request,
  { mostBytes, mostInWords, unnamed }: Limits,
): Promise<PostedForm> {
  const tooLarge = (): AppError =>
    new AppError('too-large', `The file is larger than ${mostInWords}. Nothing was kept.`);
  const body = await readCapped(request, mostBytes + FORM_BYTES, tooLarge);
  const form = await parseForm(body, request.headers.get('content-type') ?? '');
  const file = form.get('file');
  if (!(file instanceof File)) throw noFile('Post the file as multipart/form-data in the field “file”.');
  if (file.size > mostBytes) throw tooLarge();
  const fileName = baseName(file.name) || unnamed;
  return { fileName, bytes: new Uint8Array(await file.arrayBuffer()), form };
}

/**
 * What makes a browser save a file under its name and never show it: an attachment whose type is not guessed, and
 * which could run nothing even if it were opened.
 * @see RFC 6266 and RFC 5987 for the name
 */
export function attachmentHeaders(fileName: string): Record<string, string> {
  const encoded = encodeURIComponent(fileName).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16)}`);
  return {
    'content-disposition': `attachment; filename*=UTF-8''${encoded}`,
    'content-security-policy': "sandbox; default-src 'none'",
    'x-content-type-options': 'nosniff',
    'cache-control': 'private, no-store',
  };
}

function noFile(message: string, cause?: unknown): AppError {
  const errors = [{ path: 'file', message }];
  return new AppError('invalid', `${message} Nothing was kept.`, { cause, errors });
}

async function readCapped(
  request: Request,
  limit: number,
  tooLarge: () => AppError,
): Promise<Uint8Array<ArrayBuffer>> {
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
    throw noFile('The body is not a multipart/form-data form.', cause);
  }
}

/** The name without any path or control characters, as it is shown and given back. */
function baseName(name: string): string {
  const base = (name.split(/[\\/]/).at(-1) ?? '').replace(/[\p{Cc}\p{Cf}]/gu, '').trim();
  return [...base].slice(0, MAX_NAME).join('');
}

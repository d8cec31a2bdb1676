import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';

/** What Poppler, which shares nothing with the writer, reads in a PDF. */
export interface ReadPdf {
  info: Record<string, string>;
  /** One text a page, laid out as printed. */
  pages: string[];
  /** The text in the order it was written, spaces and line ends squeezed to one space. */
  text: string;
  fonts: { name: string; embedded: boolean }[];
}

/** Reads a PDF with pdfinfo, pdftotext and pdffonts. */
export function readPdf(bytes: Uint8Array): ReadPdf {
  const folder = mkdtempSync(path.join(tmpdir(), 'memo-'));
  try {
    const file = path.join(folder, 'memo.pdf');
    writeFileSync(file, bytes);
    const run = (tool: string, ...args: string[]) => execFileSync(tool, args, { encoding: 'utf8' });
    const info = Object.fromEntries(
      run('pdfinfo', file)
        .split('\n')
        .flatMap((line) =>
          /^[^:]+:/.test(line)
            ? [[line.slice(0, line.indexOf(':')), line.slice(line.indexOf(':') + 1).trim()]]
            : [],
        ),
    ) as Record<string, string>;
    const pages = run('pdftotext', '-layout', file, '-').split('\f').slice(0, -1);
    const fonts = run('pdffonts', file)
      .split('\n')
      .slice(2)
      .filter(Boolean)
      .map((line) => ({
        name: line.slice(0, 36).trim(),
        embedded: / (yes|no) +(yes|no) +(yes|no) /.exec(line)?.[1] === 'yes',
      }));
    const text = run('pdftotext', '-raw', file, '-').replace(/\s+/g, ' ');
    return { info, pages, text, fonts };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The document's catalogue as text, for entries that pdfinfo does not show. */
export const rawPdf = (bytes: Uint8Array): string => Buffer.from(bytes).toString('latin1');

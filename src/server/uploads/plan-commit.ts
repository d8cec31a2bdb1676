import type { UploadCommit } from '#contract/upload.ts';
import { CodeMaker, foldName } from '#core/csv/codes.ts';
import { lengthOf, MAX_NAME_LENGTH } from '#core/csv/limits.ts';
import type { Row } from '#core/csv/outcomes.ts';
import type { SiteRow } from '#db/queries/site.ts';
import { AppError } from '#server/errors.ts';

/** What a commit will do with each chosen row. */
export interface CommitPlan {
  add: { row: Row; code: string; name: string }[];
  update: { row: Row; before: SiteRow }[];
  skipped: number;
}

/**
 * Sorts the chosen rows into those to add, to write over a site of the study, and to leave.
 * @throws AppError 'invalid' where a chosen line is refused or begins no row
 */
export function planCommit(
  rows: readonly Row[],
  sites: readonly SiteRow[],
  { lines, duplicates }: UploadCommit,
): CommitPlan {
  const chosen =
    lines === 'accepted' ? rows.filter((row) => row.outcome !== 'refused') : pickLines(rows, lines);
  const byId = new Map(sites.map((site) => [site.id, site]));
  const fresh = new FreshIdentity(rows, sites);
  const plan: CommitPlan = { add: [], update: [], skipped: 0 };
  for (const row of chosen) {
    const { name } = row.site;
    const before = row.duplicateOf === null ? undefined : byId.get(row.duplicateOf);
    if (before === undefined) plan.add.push({ row, name, code: row.site.code ?? fresh.code(name) });
    else if (duplicates === 'update') plan.update.push({ row, before });
    else if (duplicates === 'skip') plan.skipped += 1;
    else plan.add.push({ row, ...fresh.identity(name) });
  }
  return plan;
}

function pickLines(rows: readonly Row[], lines: readonly number[]): Row[] {
  const byLine = new Map(rows.map((row) => [row.line, row]));
  const wanted = [...new Set(lines)];
  const errors = wanted.flatMap((line) => {
    const row = byLine.get(line);
    if (row !== undefined && row.outcome !== 'refused') return [];
    const message = row === undefined ? `No row begins on line ${line}.` : refusalOf(row);
    return [{ path: `lines.${lines.indexOf(line)}`, message }];
  });
  if (errors.length > 0)
    throw new AppError('invalid', 'Some of the chosen lines cannot be added. Nothing was written.', {
      errors,
    });
  return wanted.flatMap((line) => byLine.get(line) ?? []).sort((a, b) => a.line - b.line);
}

function refusalOf({ line, reasons }: Row): string {
  const first = reasons.find((reason) => reason.severity === 'refusal');
  return `Line ${line} is refused. ${first?.message ?? ''}`.trim();
}

/** Names with " (2)" behind and codes that no site and no row of the file has. */
class FreshIdentity {
  readonly #codes: CodeMaker;
  readonly #names: Set<string>;

  constructor(rows: readonly Row[], sites: readonly SiteRow[]) {
    const given = rows.flatMap((row) => row.site.code ?? []);
    this.#codes = new CodeMaker([...sites.map((site) => site.code), ...given]);
    this.#names = new Set([...sites, ...rows.map((row) => row.site)].map(({ name }) => foldName(name)));
  }

  code(name: string): string {
    return this.#codes.make(name);
  }

  identity(name: string): { name: string; code: string } {
    for (let copy = 2; ; copy += 1) {
      const mark = ` (${copy})`;
      const fits = lengthOf(name) + mark.length <= MAX_NAME_LENGTH;
      const stem = fits
        ? name
        : [...name]
            .slice(0, MAX_NAME_LENGTH - mark.length)
            .join('')
            .trimEnd();
      const numbered = `${stem}${mark}`;
      if (this.#names.has(foldName(numbered))) continue;
      this.#names.add(foldName(numbered));
      return { name: numbered, code: this.#codes.make(name) };
    }
  }
}

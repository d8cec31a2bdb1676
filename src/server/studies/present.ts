import type { Study, StudyRole } from '#contract/study.ts';
import type { findStudy } from '#db/queries/study.ts';

type Row = NonNullable<Awaited<ReturnType<typeof findStudy>>>;

/** A study as the member with this role sees it. */
export function presentStudy(row: Row, role: StudyRole): Study {
  return {
    id: row.id,
    title: row.title,
    organisation: row.organisation,
    question: row.question,
    decideBy: row.decideBy,
    state: row.state,
    archived: row.archivedAt !== null,
    role,
    revision: row.revision,
    savedAt: row.savedAt.toISOString(),
    version: row.version,
    updatedAt: row.updatedAt.toISOString(),
  };
}

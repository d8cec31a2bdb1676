import { Button, Tag } from '#components/ui/index.ts';
import { formatDateTimeUtc, formatNumber } from '#contract/format.ts';
import { STATE_NAMES } from '#contract/frame.ts';
import type { Study } from '#contract/study.ts';
import { ROLE_NAMES } from './words.ts';

interface RowActions {
  onCopy: (study: Study) => void;
  onArchive: (study: Study) => void;
}

/** A phone reads the title and the state; the rest is for wider screens. */
const WIDE = 'hidden phone:table-cell';

function StudyRow({ study, onCopy, onArchive }: { study: Study } & RowActions) {
  const reason = study.role === 'lead' ? undefined : 'A lead of the study archives and restores it.';
  return (
    <tr>
      <th scope="row">
        <a className="name" href={`/studies/${study.id}`}>
          {study.title}
        </a>
        <span className="sub phone:hidden">
          {ROLE_NAMES[study.role]}, revision {formatNumber(study.revision)}
        </span>
        <span className="sub hidden max-w-[32rem] truncate phone:block">
          {[study.organisation, study.question].filter(Boolean).join(': ') || 'No question written yet'}
        </span>
      </th>
      <td>
        <Tag>{STATE_NAMES[study.state]}</Tag> {study.archived && <Tag>Archived</Tag>}
      </td>
      <td className={WIDE}>{ROLE_NAMES[study.role]}</td>
      <td className={`num ${WIDE}`}>{study.decideBy ?? '–'}</td>
      <td className={`num ${WIDE}`}>{formatNumber(study.revision)}</td>
      <td className={`num whitespace-nowrap ${WIDE}`}>
        {formatDateTimeUtc(study.updatedAt).replace(' UTC', '')}
      </td>
      <td>
        <span className="flex justify-end gap-2">
          <Button size="small" icon="copy" aria-label={`Copy ${study.title}`} onClick={() => onCopy(study)}>
            Copy
          </Button>
          <Button
            size="small"
            icon={study.archived ? 'restore' : 'archive'}
            aria-label={`${study.archived ? 'Restore' : 'Archive'} ${study.title}`}
            notYet={reason}
            onClick={() => onArchive(study)}
          >
            {study.archived ? 'Restore' : 'Archive'}
          </Button>
        </span>
      </td>
    </tr>
  );
}

/** The studies as a table; what a person may not do stays in sight and says why. */
export function StudyTable({
  studies,
  stale,
  ...actions
}: { studies: readonly Study[]; stale: boolean } & RowActions) {
  return (
    <div className="table-scroll" role="region" aria-label="Studies" tabIndex={0}>
      <table className="table" data-hover="" aria-busy={stale}>
        <thead>
          <tr>
            <th scope="col">Study</th>
            <th scope="col">State</th>
            <th scope="col" className={WIDE}>
              Your role
            </th>
            <th scope="col" className={`num ${WIDE}`}>
              Decide by
            </th>
            <th scope="col" className={`num ${WIDE}`}>
              Revision
            </th>
            <th scope="col" className={`num ${WIDE}`}>
              Changed <span className="unit">UTC</span>
            </th>
            <th scope="col">
              <span className="sr-only">Actions</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {studies.map((study) => (
            <StudyRow key={study.id} study={study} {...actions} />
          ))}
        </tbody>
      </table>
    </div>
  );
}

import { useMemo, useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import { Notice } from '#components/ui/States.tsx';
import { formatCount } from '#contract/format.ts';
import type { UploadCommit } from '#contract/upload.ts';
import type { SitesFile } from '#core/csv/read-sites.ts';
import type { Choices } from './choices.ts';
import { ColumnMatch } from './ColumnMatch.tsx';
import { saveRefused } from './save-refused.ts';
import { UploadRows } from './UploadRows.tsx';
import { commitLabel, countsInWords, type Duplicates } from './words.ts';

interface ReadFileProps {
  fileName: string;
  file: SitesFile;
  /** The study changed between the reading and the commit; nothing was written. */
  moved: boolean;
  locked: string | null;
  choices: Choices;
  writing: boolean;
  onChoose: (choices: Choices) => void;
  onCommit: (commit: UploadCommit) => void;
  onCancel: () => void;
}

const NO_LINES: ReadonlySet<number> = new Set();

/** A file as it was read: its columns, every row, and what to add of it. */
export function ReadFile(props: ReadFileProps) {
  const { fileName, file, writing } = props;
  const [left, setLeft] = useState<ReadonlySet<number>>(NO_LINES);
  const [duplicates, setDuplicates] = useState<Duplicates>('skip');
  const chosen = useMemo(
    () => file.rows.filter((row) => row.outcome !== 'refused' && !left.has(row.line)),
    [file, left],
  );
  const written = chosen.filter((row) => row.outcome === 'new' || duplicates !== 'skip');
  const notYet = props.locked ?? (written.length === 0 ? 'No row is chosen that would be added.' : undefined);
  const commit = () =>
    props.onCommit({ lines: left.size === 0 ? 'accepted' : chosen.map(({ line }) => line), duplicates });
  return (
    <>
      <div className="upload-head">
        <div>
          <h2>{`Upload: ${fileName}`}</h2>
          <p className="caption" role="status">
            {`${countsInWords(file.rows)} Nothing is saved until you add the rows; the file itself is kept and the upload can be undone.`}
          </p>
        </div>
        <div className="upload-acts">
          <Button kind="text" onClick={props.onCancel}>
            Cancel upload
          </Button>
          {file.counts.refused > 0 && (
            <Button icon="export" onClick={() => saveRefused(file, fileName)}>
              Refused rows
            </Button>
          )}
          <Button kind="primary" busy={writing} notYet={notYet} onClick={commit}>
            {commitLabel(written, duplicates, left.size === 0)}
          </Button>
        </div>
      </div>
      {writing && <p role="status">{`Sending ${fileName} and adding its rows…`}</p>}
      {props.moved && (
        <Notice fact="The study changed while you looked at the rows. Nothing was added.">
          The rows below are read against the study as it is now. Look at them again, then add them.
        </Notice>
      )}
      {file.counts.duplicate > 0 && (
        <div className="upload-duplicates">
          <p>{`${formatCount(file.counts.duplicate, 'row')} named as a site of the study. An update writes the file’s columns and leaves the others.`}</p>
          <Segmented
            legend="Rows named as a site of the study"
            segments={[
              { value: 'skip', name: 'Skip them' },
              { value: 'update', name: 'Update the sites' },
              { value: 'add', name: 'Add them beside' },
            ]}
            value={duplicates}
            onChange={setDuplicates}
          />
        </div>
      )}
      <div className="upload-parts">
        <ColumnMatch
          columns={file.columns}
          found={{ delimiter: file.delimiter, encoding: file.encoding }}
          choices={props.choices}
          onChoose={(choices) => {
            setLeft(NO_LINES);
            props.onChoose(choices);
          }}
        />
        <UploadRows file={file} left={left} onLeave={setLeft} />
      </div>
    </>
  );
}

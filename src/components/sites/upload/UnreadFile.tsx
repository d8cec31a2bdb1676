import { Button } from '#components/ui/Button.tsx';
import { Notice } from '#components/ui/States.tsx';
import type { UnreadableFile } from '#core/csv/read-sites.ts';
import type { Choices } from './choices.ts';
import { ColumnMatch } from './ColumnMatch.tsx';

interface UnreadFileProps {
  fileName: string;
  file: UnreadableFile;
  choices: Choices;
  onChoose: (choices: Choices) => void;
  onCancel: () => void;
}

/** A file that cannot be read as a whole: why, and where only its heading fails, the way to say what is what. */
export function UnreadFile({ fileName, file, choices, onChoose, onCancel }: UnreadFileProps) {
  const matched = file.code === 'heading' || file.code === 'columns';
  const settled = file.code === 'too-large' || file.code === 'too-many-rows' || file.code === 'binary';
  return (
    <>
      <h2>{`Upload: ${fileName}`}</h2>
      <Notice fact={file.message} actions={<Button onClick={onCancel}>Pick another file</Button>}>
        {matched
          ? 'Say below which column is which, and the rows are read. Nothing was sent or saved.'
          : 'Nothing was sent or saved.'}
      </Notice>
      {!settled && <ColumnMatch columns={file.columns} choices={choices} onChoose={onChoose} />}
    </>
  );
}

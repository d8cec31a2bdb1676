import { useRef, useState, type ClipboardEvent, type DragEvent } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { TextArea } from '#components/ui/Field.tsx';

interface PickFileProps {
  onFile: (file: File) => void;
  locked: string | null;
}

const pasted = (text: string): File =>
  new File([text], 'pasted rows.tsv', { type: 'text/tab-separated-values' });

/** Pick a file, drop one, or paste rows from a spreadsheet. */
export function PickFile({ onFile, locked }: PickFileProps) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const [pasting, setPasting] = useState(false);

  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const [file] = event.dataTransfer.files;
    if (file && locked === null) onFile(file);
  };
  const paste = (event: ClipboardEvent) => {
    const [file] = event.clipboardData.files;
    const text = event.clipboardData.getData('text/plain');
    if (locked !== null || (!file && text.trim() === '')) return;
    event.preventDefault();
    onFile(file ?? pasted(text));
  };
  return (
    <div
      className="upload-drop"
      data-over={over ? '' : undefined}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      onPaste={paste}
    >
      <p>
        Drop a CSV here, pick one, or paste rows from a spreadsheet with their heading. A name, a latitude and
        a longitude are needed; code, elevation, permitted azimuths and notes are known; every other column
        becomes a criterion’s figures. Up to 5 MB and 10,000 rows.
      </p>
      <div className="upload-acts">
        <Button icon="upload" notYet={locked ?? undefined} onClick={() => input.current?.click()}>
          Pick a file
        </Button>
        <Button
          icon="copy"
          notYet={locked ?? undefined}
          aria-expanded={pasting}
          onClick={() => setPasting(!pasting)}
        >
          Paste rows
        </Button>
      </div>
      <input
        ref={input}
        type="file"
        accept=".csv,.tsv,.txt,text/csv,text/tab-separated-values,text/plain"
        aria-label="File of candidate sites"
        className="sr-only"
        tabIndex={-1}
        onChange={(event) => {
          const [file] = event.target.files ?? [];
          if (file) onFile(file);
          event.target.value = '';
        }}
      />
      {pasting && <PasteField onText={(text) => onFile(pasted(text))} />}
    </div>
  );
}

function PasteField({ onText }: { onText: (text: string) => void }) {
  const [text, setText] = useState('');
  return (
    <div className="upload-paste">
      <TextArea
        label="Rows with their heading"
        hint="Copied from a spreadsheet, or typed as CSV."
        rows={5}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <Button notYet={text.trim() === '' ? 'There are no rows yet.' : undefined} onClick={() => onText(text)}>
        Read the rows
      </Button>
    </div>
  );
}

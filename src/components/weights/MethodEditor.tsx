import { useState } from 'react';
import type { CriterionColumn } from '#components/ranking/columns.ts';
import { Button } from '#components/ui/Button.tsx';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { formatCount } from '#contract/format.ts';
import { OrderEditor } from './OrderEditor.tsx';
import { PairwiseEditor } from './PairwiseEditor.tsx';
import { StartMethod } from './StartMethod.tsx';
import type { Missing } from './statement.ts';
import { SwingEditor } from './SwingEditor.tsx';
import type { MethodDesk } from './use-method-desk.ts';
import { METHOD_WAYS, type Names } from './words.ts';

interface MethodEditorProps {
  desk: MethodDesk;
  columns: readonly CriterionColumn[];
  names: Names;
  locked: boolean;
}

const EDITORS = { swing: SwingEditor, pairwise: PairwiseEditor, centroid: OrderEditor };

/** The way on the desk, where it is not points, which stand in the table of criteria; or how to begin it. */
export function MethodEditor({ desk, columns, names, locked }: MethodEditorProps) {
  const { draft, method, missing, items, say } = desk;
  if (!draft) return <StartMethod desk={desk} names={names} locked={locked} />;
  if (method === 'points') return null;
  const Editor = EDITORS[method];
  return (
    <>
      <Editor
        items={items}
        columns={columns}
        names={names}
        statement={{ ...draft, method }}
        say={say}
        locked={locked}
      />
      {missing && <MissingNote desk={desk} missing={missing} />}
    </>
  );
}

/** "2 judgements missing": until they are there, the weights stay as they were. */
function MissingNote({ desk, missing }: { desk: MethodDesk; missing: Missing }) {
  const [asked, ask] = useState(false);
  const held = desk.set.held[desk.method] !== undefined;
  const many = missing.what === 'place in the order' ? 'places in the order' : `${missing.what}s`;
  return (
    <div className="wt-missing">
      <p role="status">
        <b>{formatCount(missing.count, missing.what, many)} missing.</b>{' '}
        {held
          ? `What you have said is kept on this page alone until nothing is missing; till then the weights stay as set by ${METHOD_WAYS[desk.set.statement.method]}.`
          : 'It counts with weight 0 until it is judged.'}
      </p>
      {held && (
        <Button size="small" onClick={() => ask(true)}>
          Drop what is not saved
        </Button>
      )}
      <ConfirmDialog
        open={asked}
        onClose={() => ask(false)}
        onConfirm={() => {
          ask(false);
          desk.drop();
        }}
        title="Drop what is not saved?"
        confirm="Drop what is not saved"
        destructive
      >
        <p>What you have said here since the last saving is lost. The saved weights stay as they are.</p>
      </ConfirmDialog>
    </div>
  );
}

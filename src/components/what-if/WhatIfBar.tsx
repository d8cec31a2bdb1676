import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Switch } from '#components/ui/Check.tsx';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { TextField } from '#components/ui/Field.tsx';
import { Tag } from '#components/ui/States.tsx';
import type { WhatIfActs } from './use-acts.ts';
import type { LiveWhatIf } from './use-what-if.ts';

interface WhatIfBarProps {
  live: LiveWhatIf;
  acts: WhatIfActs;
  /** Why this person cannot keep a what-if here; undefined where they can. */
  locked: string | undefined;
  /** Opens the question before adoption; undefined for anyone but a lead. */
  onAdopt: (() => void) | undefined;
  /** Why it cannot be adopted now. */
  notAdopted: string | undefined;
  onSave: () => void;
  onStartAnew: () => void;
}

/** The what-if's name, who sees it, and what can be done with it. */
export function WhatIfBar({ live, acts, locked, onAdopt, notAdopted, onSave, onStartAnew }: WhatIfBarProps) {
  const { kept, draft, unsaved, undo, rename } = live;
  const [lettingGo, setLettingGo] = useState(false);
  const last = draft.steps.at(-1);
  const mine = kept === null || kept.mine;
  const nameless = draft.name.trim() === '' ? 'Give the what-if a name first.' : undefined;
  const unchanged = kept?.mine && !unsaved ? 'Everything is saved.' : undefined;
  return (
    <div className="wi-bar">
      <div className="wi-name">
        <TextField
          label={mine ? 'Name of the what-if' : 'Name for a copy of your own'}
          value={draft.name}
          readOnly={locked !== undefined}
          maxLength={80}
          autoComplete="off"
          onChange={(event) => rename(event.target.value)}
        />
      </div>
      <p className="wi-state" role="status">
        {kept && !kept.mine && <Tag>By {kept.by.name}</Tag>}
        {kept?.shared ? <Tag>Shared</Tag> : mine && <Tag>You alone see it</Tag>}
        {unsaved && <Tag solid>Not saved</Tag>}
      </p>
      {kept?.mine && (
        <Switch
          label="Shared with the study’s members"
          checked={kept.shared}
          disabled={locked !== undefined || acts.busy}
          onChange={(event) => void acts.share(event.target.checked)}
        />
      )}
      <div className="wi-acts">
        <Button kind="primary" busy={acts.busy} notYet={locked ?? nameless ?? unchanged} onClick={onSave}>
          {kept?.mine ? 'Save changes' : kept ? 'Keep a copy of my own' : 'Save what-if'}
        </Button>
        <Button icon="undo" notYet={last ? undefined : 'There is no step to undo.'} onClick={undo}>
          {last ? `Undo ${last.label}` : 'Undo'}
        </Button>
        <Button icon="add" onClick={onStartAnew}>
          Start anew
        </Button>
        {onAdopt && (
          <Button icon="done" notYet={notAdopted} onClick={onAdopt}>
            Adopt for the study
          </Button>
        )}
        {kept?.mine && locked === undefined && (
          <Button kind="text" onClick={() => setLettingGo(true)}>
            Let it go
          </Button>
        )}
      </div>
      <ConfirmDialog
        open={lettingGo}
        onClose={() => setLettingGo(false)}
        onConfirm={() => void acts.letGo().then(() => setLettingGo(false))}
        title={`Let “${kept?.name ?? ''}” go?`}
        confirm="Let it go"
        destructive
        busy={acts.busy}
      >
        <p>
          The what-if is deleted{kept?.shared ? ', for everyone it is shared with' : ''}. The study stays as
          it is.
        </p>
      </ConfirmDialog>
    </div>
  );
}

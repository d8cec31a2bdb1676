import type { ReactNode } from 'react';
import { Button, Conflict, Notice } from '#components/ui/index.ts';
import type { Autosave, Versioned } from './autosave.ts';

interface TroubleProps<T extends Versioned> {
  autosave: Autosave<T>;
  /** What is saved here: "this orbit". */
  what: string;
  /** The fields in question of either version, in words. */
  describe: (version: Partial<T>, fields: readonly (keyof T)[]) => ReactNode;
}

/** What an autosaved form shows when a save did not go through: both versions, or what happened. */
export function SaveTrouble<T extends Versioned>({ autosave, what, describe }: TroubleProps<T>) {
  const { clash, failure } = autosave;
  if (clash) {
    const fields = Object.keys(clash.mine) as (keyof T)[];
    return (
      <div className="mt-4">
        <Conflict
          what={what}
          yours={describe(clash.mine, fields)}
          theirs={describe(clash.theirs, fields)}
          at={clash.at}
          keepTheirs="Keep theirs"
          putYours="Put yours in its place"
          onKeepTheirs={autosave.keepTheirs}
          onPutYours={autosave.putMine}
        />
      </div>
    );
  }
  if (!failure) return null;
  return (
    <div className="mt-4">
      <Notice
        fact={failure.message}
        requestId={failure.requestId}
        actions={<Button onClick={autosave.retry}>Save again</Button>}
      >
        {failure.errors.map(({ message }) => message).join(' ')} What you wrote is still in the fields.
      </Notice>
    </div>
  );
}

import { useState } from 'react';
import { ApiError } from '#components/live/api.ts';
import type { ChangedSite, Site, SitePatch } from '#contract/site.ts';
import { cellText, readCell, type CellKey } from './read-site.ts';
import type { SiteStore } from './use-sites.ts';

export interface CellAt {
  readonly siteId: string;
  readonly key: CellKey;
}

/** The cell being edited: its text, and what was wrong with it. */
export interface Edit extends CellAt {
  /** The site as it was when the cell was opened. */
  readonly base: Site;
  readonly text: string;
  readonly message: string | null;
  readonly meant?: string | undefined;
}

/** A stale write, for the person to decide. */
export interface CellConflict extends CellAt {
  readonly patch: SitePatch;
  readonly current: ChangedSite;
}

export interface Editing {
  readonly edit: Edit | null;
  readonly conflict: CellConflict | null;
  begin: (site: Site, key: CellKey) => void;
  type: (text: string) => void;
  cancel: () => void;
  /** Reads the text and writes it; a text that can't stand stays in its cell with the reason. */
  commit: (site: Site, text: string) => Promise<void>;
  keepTheirs: () => void;
  putYours: () => Promise<void>;
  /** Writes a change that was not typed in a cell, such as a turned sector, by the same rules. */
  write: (site: Site, key: CellKey, patch: SitePatch) => Promise<void>;
}

/**
 * What an edit is based on. Someone's change that arrives while the cell is open is a conflict where it touches that
 * cell; where it touches another, the edit stands on the site as it is now.
 */
const baseOf = ({ base, key }: Edit, now: Site): Site =>
  cellText(now, key) === cellText(base, key) ? now : base;

const isStale = (error: unknown): error is ApiError => error instanceof ApiError && error.code === 'stale';

/** Editing one cell at a time, with the conflict that a change of someone else's can bring. */
export function useEditing(store: SiteStore): Editing {
  const [edit, setEdit] = useState<Edit | null>(null);
  const [conflict, setConflict] = useState<CellConflict | null>(null);

  const write = async (site: Site, key: CellKey, patch: SitePatch): Promise<void> => {
    const changed = {
      ...site,
      ...patch,
      values: site.values,
      particulars: site.particulars,
      version: site.version,
    };
    store.show(changed);
    try {
      await store.change(site, patch);
    } catch (error) {
      if (isStale(error)) {
        const current = error.current as ChangedSite;
        store.show(current);
        setConflict({ siteId: site.id, key, patch, current });
      } else {
        store.show(site);
        setEdit({
          siteId: site.id,
          key,
          base: site,
          text: cellText(changed, key),
          message: error instanceof Error ? error.message : String(error),
        });
      }
    }
  };

  return {
    edit,
    conflict,
    begin: (site, key) =>
      setEdit({ siteId: site.id, key, base: site, text: cellText(site, key), message: null }),
    type: (text) => setEdit((now) => now && { ...now, text, message: null, meant: undefined }),
    cancel: () => setEdit(null),
    commit: async (site, text) => {
      if (!edit) return;
      if (text === cellText(edit.base, edit.key)) {
        setEdit(null);
        return;
      }
      const reading = readCell(edit.key, text);
      if (reading.kind === 'refused') {
        setEdit({ ...edit, text, message: reading.message, meant: reading.meant });
        return;
      }
      setEdit(null);
      await write(baseOf(edit, site), edit.key, reading.value);
    },
    keepTheirs: () => {
      if (conflict) store.show(conflict.current);
      setConflict(null);
    },
    putYours: async () => {
      if (!conflict) return;
      setConflict(null);
      await write(conflict.current, conflict.key, conflict.patch);
    },
    write,
  };
}

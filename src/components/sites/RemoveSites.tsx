import { useState } from 'react';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { formatCount, listInWords } from '#contract/format.ts';
import type { Site } from '#contract/site.ts';

/** "Tern Head", "Tern Head and Skarvnes", "14 sites" */
export const sitesInWords = (sites: readonly Pick<Site, 'name'>[]): string =>
  sites.length <= 2 ? listInWords(sites.map(({ name }) => name)) : formatCount(sites.length, 'site');

interface RemoveProps {
  /** Those ticked; null while nothing is asked. */
  sites: readonly Site[] | null;
  onClose: () => void;
  onRemove: (sites: readonly Site[]) => Promise<void>;
}

/** Asked before sites are taken out of the study. */
export function RemoveSites({ sites, onClose, onRemove }: RemoveProps) {
  const [busy, setBusy] = useState(false);
  const what = sitesInWords(sites ?? []);
  const remove = async () => {
    setBusy(true);
    await onRemove(sites ?? []).finally(() => setBusy(false));
  };
  return (
    <ConfirmDialog
      open={sites !== null}
      onClose={onClose}
      onConfirm={() => void remove()}
      title={`Remove ${what}?`}
      confirm={`Remove ${what}`}
      destructive
      busy={busy}
    >
      {sites?.length === 1 ? 'Its figures leave' : 'Their figures leave'} the ranking. The record keeps them,
      and for a few seconds the removal can be undone.
    </ConfirmDialog>
  );
}

import { useState } from 'react';
import { useApi } from '#components/live/hooks.ts';
import { SideSheet } from '#components/ui/SideSheet.tsx';
import { Notice } from '#components/ui/States.tsx';
import type { Criterion } from '#contract/criterion.ts';
import type { Site } from '#contract/site.ts';
import { ComputedFrom } from './ComputedFrom.tsx';
import { EvidenceFiles } from './EvidenceFiles.tsx';
import { entryOf, isEntered, type Entry } from './figure.ts';
import { FigureForm } from './FigureForm.tsx';

interface FigureSheetProps {
  studyId: string;
  siteId: string;
  siteName: string;
  criterion: Criterion;
  /** A computed figure as it is read, "22.3 t/yr"; entered ones are read afresh. */
  computed?: string | undefined;
  /** Why this person may not change figures; undefined where they may. */
  locked: string | undefined;
  onClose: () => void;
  onSaved?: ((entry: Entry) => void) | undefined;
  /** A file came or went. */
  onFiles?: (() => void) | undefined;
}

/** One figure at the side: what it is, how sure, where it comes from, and the files that support it. */
export function FigureSheet(props: FigureSheetProps) {
  const { siteName, criterion, onClose } = props;
  return (
    <SideSheet open onClose={onClose} title={`${criterion.name}, ${siteName}`}>
      {isEntered(criterion) ? (
        <EnteredFigure key={`${props.siteId}/${criterion.id}`} {...props} />
      ) : (
        <ComputedFrom {...props} />
      )}
    </SideSheet>
  );
}

function EnteredFigure({ studyId, siteId, criterion, locked, onSaved, onFiles }: FigureSheetProps) {
  const { data, error, mutate } = useApi<Site>(`/api/v1/studies/${studyId}/sites/${siteId}`, {
    revalidateOnFocus: false,
    keepPreviousData: false,
  });
  // What is typed rests on the site as it was opened, whatever arrives meanwhile: a save then meets the conflict.
  const [base, setBase] = useState<Site | null>(null);
  const site = base ?? data;
  if (error && !site) return <Notice fact="The figure could not be read.">{error.message}</Notice>;
  if (!site) return <p className="caption">Reading the figure.</p>;
  const entry = entryOf(site, criterion.id);
  return (
    <>
      {locked !== undefined && <p className="caption">{locked}</p>}
      <FigureForm
        key={site.version}
        studyId={studyId}
        site={site}
        criterion={criterion}
        locked={locked}
        onTake={setBase}
        onSaved={(saved, next) => {
          setBase(saved);
          void mutate(saved, { revalidate: false });
          onSaved?.(next);
        }}
      />
      <EvidenceFiles
        studyId={studyId}
        figure={{ siteId, criterionId: criterion.id }}
        locked={
          locked ?? (entry.value === null ? 'Save a figure before you add evidence for it.' : undefined)
        }
        onChange={() => onFiles?.()}
      />
    </>
  );
}

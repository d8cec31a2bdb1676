import { lazy, Suspense, useMemo, useState, type ReactNode } from 'react';
import type { LiveRanking } from '#components/ranking/use-ranking.ts';
import { toast } from '#components/ui/Toast.tsx';
import { formatNumber } from '#contract/format.ts';
import { entryWords, isEntered, type Entry } from './figure.ts';
import { writeFigure, type Written } from './write-figure.ts';

/** Fetched when the first figure is opened: the ranking does without it. */
const FigureSheet = lazy(async () => ({ default: (await import('./FigureSheet.tsx')).FigureSheet }));

interface FigureAt {
  siteId: string;
  criterionId: string;
}

/** Figures worked with beside a ranking: which one is open at the side, and what a saved one leaves behind. */
export interface FigureDesk {
  studyId: string;
  locked: string | undefined;
  onOpen: (siteId: string, criterionId: string) => void;
  onSaved: (criterionId: string, saved: Extract<Written, { kind: 'saved' }>, entry: Entry) => void;
}

/** @returns what cells work with, and the open figure's sheet */
export function useFigureDesk(
  studyId: string,
  live: LiveRanking,
  locked: string | undefined,
): { desk: FigureDesk; sheet: ReactNode } {
  const [open, setOpen] = useState<FigureAt | null>(null);
  const { enter, again, model } = live;
  const figures = model?.figures;
  const criteria = figures?.criteria;
  const desk = useMemo<FigureDesk>(() => {
    const onOpen = (siteId: string, criterionId: string): void => setOpen({ siteId, criterionId });
    return {
      studyId,
      locked,
      onOpen,
      onSaved: (criterionId, { site, before }, entry) => {
        const at = { siteId: site.id, criterionId };
        const criterion = criteria?.find(({ id }) => id === criterionId);
        enter(at, entry);
        const undo = async (): Promise<void> => {
          const back = await writeFigure(studyId, site, criterionId, before);
          if (back.kind === 'saved') enter(at, before);
          // Someone has changed it meanwhile: it stands at the side as it is now, for the person to see.
          else onOpen(site.id, criterionId);
        };
        if (criterion)
          toast(`${criterion.name} of ${site.name}: ${entryWords(entry, criterion)}`, () => void undo());
      },
    };
  }, [studyId, locked, criteria, enter]);

  const criterion = criteria?.find(({ id }) => id === open?.criterionId);
  const place = figures?.sites.findIndex(({ siteId }) => siteId === open?.siteId) ?? -1;
  const site = figures?.sites[place];
  if (!open || !figures || !criterion || !site) return { desk, sheet: null };
  const sheet = (
    <Suspense>
      <FigureSheet
        studyId={studyId}
        siteId={site.siteId}
        siteName={site.name}
        criterion={criterion}
        computed={isEntered(criterion) ? undefined : computedText(live, place, criterion.id)}
        locked={locked}
        onClose={() => setOpen(null)}
        onSaved={(entry) => enter(open, entry)}
        onFiles={again}
      />
    </Suspense>
  );
  return { desk, sheet };
}

function computedText({ model }: LiveRanking, site: number, criterionId: string): string | undefined {
  if (!model) return undefined;
  const { criteria, cells } = model.figures;
  const place = criteria.findIndex(({ id }) => id === criterionId);
  const cell = cells[site]?.[place];
  const note = model.notes.get(site * criteria.length + place);
  if (typeof cell !== 'number') return note ?? 'no figure';
  const unit = criteria[place]?.unit ?? '';
  const figure = [formatNumber(cell, model.decimals[place] ?? 0), unit].filter(Boolean).join(' ');
  return note === undefined ? figure : `${figure}, ${note}`;
}

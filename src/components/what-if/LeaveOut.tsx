import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import type { RankingSite } from '#contract/ranking.ts';
import { noSiteMeant, SiteField, siteMeant } from './SiteField.tsx';

interface LeaveOutProps {
  /** Those still in. */
  sites: readonly RankingSite[];
  onLeaveOut: (site: RankingSite) => void;
}

/** Chooses a site and tries the ranking without it. */
export function LeaveOut({ sites, onLeaveOut }: LeaveOutProps) {
  const [typed, setTyped] = useState('');
  const [error, setError] = useState<string | undefined>();
  return (
    <form
      className="wi-form"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const site = siteMeant(sites, typed);
        setError(site ? undefined : noSiteMeant(typed));
        if (!site) return;
        setTyped('');
        onLeaveOut(site);
      }}
    >
      <SiteField label="Site to leave out" sites={sites} value={typed} onChange={setTyped} error={error} />
      <div className="wi-form-acts">
        <Button size="small" type="submit">
          Leave this site out
        </Button>
      </div>
    </form>
  );
}

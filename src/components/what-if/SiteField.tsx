import { useId } from 'react';
import { Select, TextField, type FieldError } from '#components/ui/Field.tsx';
import type { RankingSite } from '#contract/ranking.ts';

/** So many sites are chosen from a list; more are typed. */
const MOST_LISTED = 100;
const MOST_OFFERED = 40;

interface SiteFieldProps {
  label: string;
  sites: readonly RankingSite[];
  value: string;
  onChange: (value: string) => void;
  error: FieldError;
}

/** A site by its code; in a long study by its name too, with the nearest offered while typing. */
export function SiteField({ label, sites, value, onChange, error }: SiteFieldProps) {
  const offered = useId();
  if (sites.length <= MOST_LISTED)
    return (
      <Select
        label={label}
        error={error}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        choices={[
          { value: '', name: 'Choose a site' },
          ...sites.map(({ code, name }) => ({ value: code, name })),
        ]}
      />
    );
  const sought = value.trim().toLowerCase();
  const near = sites.filter(({ name, code }) => `${name} ${code}`.toLowerCase().includes(sought));
  return (
    <>
      <TextField
        label={label}
        hint="By name or code."
        error={error}
        value={value}
        list={offered}
        autoComplete="off"
        onChange={(event) => onChange(event.target.value)}
      />
      <datalist id={offered}>
        {near.slice(0, MOST_OFFERED).map(({ siteId, code, name }) => (
          <option key={siteId} value={code}>
            {name}
          </option>
        ))}
      </datalist>
    </>
  );
}

/** The site meant by a code or a name, whatever its case. */
export function siteMeant(sites: readonly RankingSite[], typed: string): RankingSite | undefined {
  const sought = typed.trim().toLowerCase();
  return (
    sites.find(({ code }) => code.toLowerCase() === sought) ??
    sites.find(({ name }) => name.toLowerCase() === sought)
  );
}

/** Why no site is meant: none was chosen, or what was typed is none's. */
export const noSiteMeant = (typed: string): string =>
  typed.trim() === '' ? 'Choose a site.' : 'No site here has that name or code.';

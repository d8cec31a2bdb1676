import { formatLatitude } from '#contract/format.ts';

interface SiteHeadProps {
  site: { code: string; name: string; latitudeDeg: number };
  onChoose: (code: string) => void;
}

/** A site at the head of its row: chosen by its name, with its code and latitude under it. */
export function SiteHead({ site, onChoose }: SiteHeadProps) {
  return (
    <>
      <button type="button" className="text-left" onClick={() => onChoose(site.code)}>
        <span className="name max-w-56 truncate" title={site.name}>
          {site.name}
        </span>
      </button>
      <span className="sub num">
        {site.code} {formatLatitude(site.latitudeDeg)}
      </span>
    </>
  );
}

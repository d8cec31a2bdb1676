import { useFinding } from '#components/live/hooks.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { Finding } from '#components/ui/Finding.tsx';
import { textOf, type SitesFinding } from './finding.ts';

interface HeadProps {
  finding: SitesFinding;
  /** Why the inputs can't be changed; null where they can. */
  locked: string | null;
  onAdd: () => void;
}

/** The finding with its why, and the two ways to bring sites in. */
export function SitesHead({ finding, locked, onAdd }: HeadProps) {
  useFinding(textOf(finding));
  return (
    <Finding
      why={(finding.why || locked) && <p>{[finding.why, locked].filter(Boolean).join(' ')}</p>}
      actions={
        <>
          <ButtonLink icon="upload" href="#upload">
            Upload CSV
          </ButtonLink>
          <Button kind="primary" icon="add" notYet={locked ?? undefined} onClick={onAdd}>
            Add a site
          </Button>
        </>
      }
    >
      {finding.before}
      {finding.leader && <em>{finding.leader}</em>}
      {finding.after}
    </Finding>
  );
}

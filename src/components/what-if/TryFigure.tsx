import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { NumberField, Select } from '#components/ui/Field.tsx';
import type { Criterion } from '#contract/criterion.ts';
import { readTypedNumber } from '#contract/format.ts';
import type { RankingFigures, RankingSite } from '#contract/ranking.ts';
import { figureInFull } from '#contract/what-if-words.ts';
import { noSiteMeant, SiteField, siteMeant } from './SiteField.tsx';

export interface TriedFigure {
  site: RankingSite;
  criterion: Criterion;
  value: number | null;
}

/** Chooses a site and a criterion whose figures are entered, and tries another figure, or none. */
export function TryFigure({
  figures,
  onTry,
}: {
  figures: RankingFigures;
  onTry: (tried: TriedFigure) => void;
}) {
  const enterable = figures.criteria.filter(({ source }) => source === 'entered' || source === 'rating');
  const [siteText, setSiteText] = useState('');
  const [criterionId, setCriterionId] = useState(enterable[0]?.id ?? '');
  const [typed, setTyped] = useState('');
  const [fault, setFault] = useState<{ field: 'site' | 'value'; message: string } | null>(null);
  const criterion = enterable.find(({ id }) => id === criterionId) ?? enterable[0];
  if (!criterion)
    return <p className="caption">Every figure of this study is computed; none can be tried by itself.</p>;
  const site = siteMeant(figures.sites, siteText);
  const attempt = (value: number | string | null | undefined): void => {
    if (!site) setFault({ field: 'site', message: noSiteMeant(siteText) });
    else if (value !== null && typeof value !== 'number')
      setFault({ field: 'value', message: `${typed.trim() || 'Nothing'} is no figure.` });
    else {
      setFault(null);
      setTyped('');
      onTry({ site, criterion, value });
    }
  };
  const error = (field: 'site' | 'value') => (fault?.field === field ? fault.message : undefined);
  return (
    <form
      className="wi-form"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        attempt(readTypedNumber(typed));
      }}
    >
      <SiteField
        label="Site of the figure"
        sites={figures.sites}
        value={siteText}
        onChange={setSiteText}
        error={error('site')}
      />
      <Select
        label="Criterion of the figure"
        value={criterion.id}
        choices={enterable.map(({ id, name }) => ({ value: id, name }))}
        onChange={(event) => {
          setCriterionId(event.target.value);
          setTyped('');
        }}
      />
      {criterion.steps ? (
        <Select
          label="Figure to try"
          value={typed}
          error={error('value')}
          choices={[
            { value: '', name: 'Choose a step' },
            ...criterion.steps.map((name, step) => ({ value: String(step), name: `${name} (${step})` })),
          ]}
          onChange={(event) => setTyped(event.target.value)}
        />
      ) : (
        <NumberField
          label="Figure to try"
          unit={criterion.unit || undefined}
          value={typed}
          error={error('value')}
          onChange={(event) => setTyped(event.target.value)}
        />
      )}
      <div className="wi-form-acts">
        <Button size="small" type="submit">
          Try this figure
        </Button>
        <Button size="small" kind="text" onClick={() => attempt(null)}>
          Try without a figure
        </Button>
      </div>
      {site && <p className="caption wi-form-note">{nowInWords(figures, site, criterion)}</p>}
    </form>
  );
}

function nowInWords(figures: RankingFigures, site: RankingSite, criterion: Criterion): string {
  const at = figures.sites.indexOf(site);
  const place = figures.criteria.indexOf(criterion);
  const cell = figures.cells[at]?.[place];
  const known = figures.particulars.find(([s, p]) => s === at && p === place)?.[2];
  const bounds = (['low', 'high'] as const).flatMap((part) =>
    known?.[part] === undefined ? [] : [`${part} ${figureInFull(criterion, known[part])}`],
  );
  const figure = figureInFull(criterion, typeof cell === 'number' ? cell : null);
  return `The study has ${[figure, ...bounds].join(', ')} for ${site.name}.`;
}

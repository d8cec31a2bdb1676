import { Caution, Panel } from '#components/ui/index.ts';
import { attributions } from '#core/downrange/attributions.ts';
import { REGULATION, cautions } from '#core/downrange/cautions.ts';
import { SCREENING, WHO_DECIDES } from './words.ts';

/** The caution that stands beside every figure of the section. */
export function ScreeningCaution() {
  return (
    <Caution>
      <b>{SCREENING}</b> {WHO_DECIDES}
    </Caution>
  );
}

/** What the figures leave out, and what they come from. */
export function DataLimits() {
  return (
    <Panel title="What these figures are not" caption={`Corridor, tables and formula: ${REGULATION}.`}>
      <ul className="downrange-limits">
        {cautions.map((caution) => (
          <li key={caution}>{caution}</li>
        ))}
      </ul>
      <h3 className="mt-6">Data</h3>
      <dl className="downrange-data">
        {attributions.map(({ what, source, licence, package: from, note }) => (
          <div key={what}>
            <dt>{what}</dt>
            <dd>
              {source}; {licence}; by way of {from}. {note}
            </dd>
          </div>
        ))}
      </dl>
      <p className="caption mt-3">Boundaries as in the data, no position taken.</p>
    </Panel>
  );
}

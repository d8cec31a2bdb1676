import { useState } from 'react';
import { Button, Checkbox, Conflict, Notice, NumberField, Panel, toast } from '#components/ui/index.ts';
import { useAddressParam } from '#components/live/address.ts';
import type { StudyFan } from '#contract/downrange.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { writeSectors } from '#core/csv/sectors.ts';
import { MAX_SECTORS } from '#core/csv/limits.ts';
import {
  inclinationsInWords,
  offerOf,
  readLimits,
  setsNone,
  type Offer,
  type TypedLimits,
} from './limits.ts';
import { usePermitted } from './use-permitted.ts';

export interface LimitsAddress {
  readonly clear: string | null;
  readonly people: string | null;
  readonly zone: string | null;
}

interface OpenSectorsProps {
  studyId: string;
  fan: StudyFan;
  site: InputSite;
  parkingKm: number;
  address: LimitsAddress;
  locked: string | null;
}

const wordsOf = (sectors: readonly (readonly [number, number])[]): string =>
  sectors.length === 0 ? 'all round' : writeSectors(sectors);

function useLimits(address: LimitsAddress) {
  const [clear, setClear] = useAddressParam('clear', address.clear);
  const [people, setPeople] = useAddressParam('most', address.people);
  const [zone, setZone] = useAddressParam('zone', address.zone);
  const typed: TypedLimits = { clearKm: clear ?? '', people: people ?? '', exclusionEmpty: zone === 'empty' };
  return {
    typed,
    setClear: (text: string) => setClear(text === '' ? null : text),
    setPeople: (text: string) => setPeople(text === '' ? null : text),
    setZone: (on: boolean) => setZone(on ? 'empty' : null),
  };
}

/** Copies the sectors' text; where the browser will not, the text is selected to be copied by hand. */
function CopyButton({ text }: { text: string }) {
  const [refused, setRefused] = useState(false);
  const copy = () => {
    navigator.clipboard.writeText(text).then(
      () => toast('Sectors copied'),
      () => setRefused(true),
    );
  };
  return (
    <>
      <Button size="small" onClick={copy}>
        Copy the sectors
      </Button>
      {refused && <span role="status">The browser did not allow copying: select the text above.</span>}
    </>
  );
}

/** Why the sectors can't become the site's, in words. */
function notYet(locked: string | null, { sectors }: Offer, ready: boolean): string | undefined {
  if (locked) return locked;
  if (sectors.length > MAX_SECTORS) return `A site has at most ${MAX_SECTORS} permitted sectors.`;
  return ready ? undefined : 'The site is being read.';
}

function OfferLines({ offer }: { offer: Offer }) {
  const unknown = offer.sectors.some(({ complete }) => !complete);
  return (
    <>
      <p>
        {formatCount(offer.sectors.length, 'sector')}, {formatNumber(offer.widthDeg)}° together:{' '}
        <output className="num downrange-sectors">{offer.text}</output>
      </p>
      <p className="caption">
        They open inclinations {inclinationsInWords(offer.inclinations)} without a turn.
        {unknown &&
          ' Somewhere in them people are unknown: a limit on people is kept only as far as is known.'}{' '}
        Only whole degrees are looked at, along a straight ground track.
      </p>
    </>
  );
}

/** Limits that a person types, and the sectors of the fan that keep within them: an offer, and no permission. */
export function OpenSectors({ studyId, fan, site, parkingKm, address, locked }: OpenSectorsProps) {
  const { typed, setClear, setPeople, setZone } = useLimits(address);
  const permitted = usePermitted(studyId, site.siteId);
  const { limits, errors } = readLimits(typed);
  const offer = offerOf(fan.spokes, limits, site, parkingKm);
  const sectors = offer.sectors.map(({ fromDeg, toDeg }): [number, number] => [fromDeg, toDeg]);
  const wrong = errors.clearKm !== undefined || errors.people !== undefined;
  return (
    <Panel
      title="Azimuths that keep within limits"
      caption="Limits are yours, for comparing; they are not the regulator’s. An empty field sets none."
    >
      <div className="downrange-controls">
        <NumberField
          label="Clear distance, at least"
          unit="km"
          value={typed.clearKm}
          error={errors.clearKm}
          onChange={(event) => setClear(event.target.value)}
        />
        <NumberField
          label="People in the corridor, at most"
          hint={fan.spokes[0]?.spreadPeople === null ? 'Listed people alone.' : 'Listed and spread people.'}
          value={typed.people}
          error={errors.people}
          onChange={(event) => setPeople(event.target.value)}
        />
        <Checkbox
          label="No listed settlement in the exclusion zone"
          checked={typed.exclusionEmpty}
          onChange={(event) => setZone(event.target.checked)}
        />
      </div>
      <div className="downrange-offer" aria-live="polite">
        {wrong ? (
          <p>Nothing is offered until the limits can be read.</p>
        ) : setsNone(limits) ? (
          <p>Set a limit to see the sectors that keep within it.</p>
        ) : offer.sectors.length === 0 ? (
          <p>No sector of two whole degrees or more keeps within these limits.</p>
        ) : (
          <>
            <OfferLines offer={offer} />
            <div className="downrange-acts">
              <CopyButton text={offer.text} />
              <Button
                size="small"
                busy={permitted.busy}
                notYet={notYet(locked, offer, permitted.use !== null)}
                onClick={() => void permitted.use?.(sectors)}
              >
                Use as permitted azimuths
              </Button>
              <span className="text-sm text-ink-2">
                Now permitted: <span className="num">{wordsOf(site.permittedAzimuthsDeg)}</span>
              </span>
            </div>
          </>
        )}
      </div>
      {permitted.error && (
        <Notice fact="The permitted azimuths were not changed." requestId={permitted.error.requestId}>
          {permitted.error.message}
        </Notice>
      )}
      {permitted.conflict && (
        <Conflict
          what={`the permitted azimuths of ${site.name}`}
          yours={wordsOf(permitted.conflict.yours)}
          theirs={wordsOf(permitted.conflict.theirs.permittedAzimuthsDeg)}
          by={permitted.conflict.theirs.changedBy ?? undefined}
          at={permitted.conflict.theirs.changedAt ?? undefined}
          keepTheirs={`Keep ${wordsOf(permitted.conflict.theirs.permittedAzimuthsDeg)}`}
          putYours={`Put ${wordsOf(permitted.conflict.yours)}`}
          onKeepTheirs={permitted.keepTheirs}
          onPutYours={permitted.putYours}
        />
      )}
    </Panel>
  );
}

import { useState } from 'react';
import { formatNumber, readTypedNumber } from '#contract/format.ts';
import { DrawQuery } from '#contract/sensitivity.ts';
import { NumberField } from '#components/ui/Field.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import type { DrawSettings as Settings } from './use-draw-query.ts';

const PERCENT = 100;
const { band: Band, samples: Samples, seed: Seed } = DrawQuery.shape;

/** Which weights are drawn, how often, and from which seed. */
export function DrawSettings({ settings }: { settings: Settings }) {
  const { query } = settings;
  return (
    <div className="sv-settings">
      <div>
        <p className="fld-label" aria-hidden="true">
          Weights drawn
        </p>
        <Segmented
          legend="Weights drawn"
          value={query.model}
          onChange={settings.setModel}
          segments={[
            { value: 'band', name: 'Within a band' },
            { value: 'order', name: 'In their order' },
            { value: 'simplex', name: 'Any at all' },
          ]}
        />
      </div>
      {query.model === 'band' && (
        <NumberParam
          label="Band"
          unit="± % of each weight"
          value={query.band * PERCENT}
          onTake={(percent) => settings.setBand(percent / PERCENT)}
          faultOf={(percent) =>
            Band.safeParse(percent / PERCENT).success ? null : 'A band lies between 0 and 100 %.'
          }
        />
      )}
      <NumberParam
        label="Samples"
        value={query.samples}
        onTake={settings.setSamples}
        faultOf={(samples) => faultIn(Samples, samples)}
      />
      <NumberParam
        label="Seed"
        value={query.seed}
        onTake={settings.setSeed}
        faultOf={(seed) => faultIn(Seed, seed)}
      />
    </div>
  );
}

function faultIn(schema: typeof Samples | typeof Seed, value: number): string | null {
  return schema.safeParse(value).error?.issues[0]?.message ?? null;
}

interface NumberParamProps {
  label: string;
  unit?: string;
  value: number;
  onTake: (value: number) => void;
  /** What is wrong with a number; null where nothing is. */
  faultOf: (value: number) => string | null;
}

/** A number that counts on leaving the field or on Enter. */
function NumberParam({ label, unit, value, onTake, faultOf }: NumberParamProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const take = (): void => {
    if (typed === null) return;
    const read = readTypedNumber(typed);
    const wrong = typeof read === 'number' ? faultOf(read) : 'Enter a number.';
    setFault(wrong);
    if (wrong !== null || typeof read !== 'number') return;
    setTyped(null);
    if (read !== value) onTake(read);
  };
  return (
    <NumberField
      label={label}
      unit={unit}
      error={fault ?? undefined}
      value={typed ?? shown(value)}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => {
        if (event.key === 'Enter') take();
      }}
    />
  );
}

/** Percent of a band as typed: 12.5, not 12.500000000000002. */
const shown = (value: number): string =>
  Number.isInteger(value) ? formatNumber(value) : String(Number(value.toPrecision(12)));

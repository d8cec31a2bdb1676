import { DrawQuery, WeightModelKind } from '#contract/sensitivity.ts';
import { useViewParam } from '../use-view-param.ts';

/** How to draw, as the address says it; what it says wrong counts as left out. */
export interface DrawSettings {
  query: DrawQuery;
  setModel: (model: string) => void;
  setBand: (band: number) => void;
  setSamples: (samples: number) => void;
  setSeed: (seed: number) => void;
}

const DEFAULTS = DrawQuery.parse({});

export function useDrawQuery(): DrawSettings {
  const [model, setModel] = useViewParam('model');
  const [band, setBand] = useViewParam('band');
  const [samples, setSamples] = useViewParam('samples');
  const [seed, setSeed] = useViewParam('seed');
  const { shape } = DrawQuery;
  const given = (value: string | null): string | undefined => value ?? undefined;
  const setOr =
    (set: (value: string | null) => void, usual: number) =>
    (value: number): void =>
      set(value === usual ? null : String(value));
  return {
    query: {
      model: WeightModelKind.catch(DEFAULTS.model).parse(model),
      band: shape.band.catch(DEFAULTS.band).parse(given(band)),
      samples: shape.samples.catch(DEFAULTS.samples).parse(given(samples)),
      seed: shape.seed.catch(DEFAULTS.seed).parse(given(seed)),
    },
    setModel: (next) => setModel(next === DEFAULTS.model ? null : next),
    setBand: setOr(setBand, DEFAULTS.band),
    setSamples: setOr(setSamples, DEFAULTS.samples),
    setSeed: setOr(setSeed, DEFAULTS.seed),
  };
}

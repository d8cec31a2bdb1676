import { Segmented } from '#components/ui/Segmented.tsx';
import { WeightMethod } from '#contract/weights.ts';
import type { MethodDesk } from './use-method-desk.ts';
import { METHOD_HINTS, METHOD_NAMES } from './words.ts';

/** By which of the four ways weights are set. Choosing one changes nothing yet. */
export function MethodBar({ desk }: { desk: MethodDesk }) {
  return (
    <div className="wt-method">
      <Segmented
        legend="How weights are set"
        value={desk.method}
        onChange={desk.choose}
        segments={WeightMethod.options.map((value) => ({ value, name: METHOD_NAMES[value] }))}
      />
      <p className="caption">{METHOD_HINTS[desk.method]}</p>
    </div>
  );
}

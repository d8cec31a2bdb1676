import { useId } from 'react';
import { RATIOS, ratioInFigures, ratioInWords } from './judgement.ts';

interface StripProps {
  first: string;
  second: string;
  /** How many times the first outweighs the second; undefined where it is not judged yet. */
  ratio: number | undefined;
  onJudge: (ratio: number) => void;
  locked: boolean;
}

/** From 9 for the first over 1 to 9 for the second: radios, so that the arrow keys judge. */
export function JudgementStrip({ first, second, ratio, onJudge, locked }: StripProps) {
  const name = useId();
  return (
    <fieldset className="wt-strip">
      <legend className="sr-only">
        {first} against {second}
      </legend>
      <div className="wt-scale">
        <div className="wt-ends" aria-hidden="true">
          <b>{first}</b>
          <span>equal</span>
          <b>{second}</b>
        </div>
        <div className="wt-stops">
          {RATIOS.map((one) => (
            <label
              key={one}
              title={ratioInWords(one, first, second)}
              data-middle={one === 1 ? '' : undefined}
            >
              <input
                type="radio"
                className="wt-radio"
                name={name}
                checked={isSame(one, ratio)}
                disabled={locked}
                aria-label={`${ratioInFigures(one)}: ${ratioInWords(one, first, second)}`}
                onChange={() => onJudge(one)}
              />
              <span aria-hidden="true">{one >= 1 ? ratioInFigures(one) : ratioInFigures(1 / one)}</span>
            </label>
          ))}
        </div>
      </div>
      <p className="wt-said">
        {ratio === undefined
          ? `Which matters more, ${first} or ${second}, and how many times?`
          : `${ratioInWords(ratio, first, second)} (${ratioInFigures(ratio)}).`}
      </p>
    </fieldset>
  );
}

/** 1/3 may have been written with few digits. */
const isSame = (one: number, ratio: number | undefined): boolean =>
  ratio !== undefined && Math.abs(Math.log(one / ratio)) < 1e-3;

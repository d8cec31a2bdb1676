import { Icon } from '#components/ui/Icon.tsx';
import { formatNumber } from '#contract/format.ts';
import type { WeightStatement } from '#contract/weights.ts';
import { ratioInFigures, ratioInWords, ratioOf } from './judgement.ts';
import { nameIn, type Names } from './words.ts';

type Pair = readonly [first: string, second: string];

interface MatrixProps {
  ids: readonly string[];
  names: Names;
  judgements: WeightStatement['judgements'];
  /** By id, of this level; null while judgements are missing. */
  weights: Readonly<Record<string, number>> | null;
  current: Pair;
  /** The judgement that disagrees most, where they disagree. */
  worst: Pair | null;
  onShow: (pair: Pair) => void;
}

/** Row against column: every judgement above the diagonal, its turn below it. A cell opens its judgement. */
export function JudgementMatrix({ ids, names, judgements, weights, current, worst, onShow }: MatrixProps) {
  const is = (pair: Pair | null, a: string, b: string): boolean =>
    pair !== null && pair.includes(a) && pair.includes(b);
  return (
    <div className="table-scroll" role="region" aria-label="Judgements, row against column" tabIndex={0}>
      <table className="wt-matrix table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Row against column</th>
            {ids.map((id) => (
              <th scope="col" className="num" key={id}>
                {nameIn(names, id)}
              </th>
            ))}
            <th scope="col" className="num">
              Weight<span className="unit">of this level</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {ids.map((a, row) => (
            <tr key={a}>
              <th scope="row">{nameIn(names, a)}</th>
              {ids.map((b, column) => {
                const ratio = ratioOf(judgements, a, b);
                if (row === column)
                  return (
                    <td className="num" key={b} aria-label="itself">
                      1
                    </td>
                  );
                const words =
                  ratio === undefined
                    ? `${nameIn(names, a)} against ${nameIn(names, b)}: not judged yet`
                    : ratioInWords(ratio, nameIn(names, a), nameIn(names, b));
                return (
                  <td className="num" key={b}>
                    <button
                      type="button"
                      className="wt-cell"
                      aria-label={is(worst, a, b) ? `${words}; disagrees most` : words}
                      aria-current={is(current, a, b) || undefined}
                      data-missing={ratio === undefined ? '' : undefined}
                      data-worst={is(worst, a, b) ? '' : undefined}
                      onClick={() => onShow([a, b])}
                    >
                      {is(worst, a, b) && <Icon name="again" size={12} />}
                      {ratio === undefined ? '?' : ratioInFigures(ratio)}
                    </button>
                  </td>
                );
              })}
              <td className="num">{weights ? formatNumber(weights[a] ?? 0, 3) : '–'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

import type { CriterionColumn } from '#components/ranking/columns.ts';
import type { WeightStatement } from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import type { Names } from './words.ts';

/** What every way to set weights is given. */
export interface EditorProps {
  items: readonly WeighItem[];
  columns: readonly CriterionColumn[];
  /** Of criteria and groups. */
  names: Names;
  /** What is said by this way so far. */
  statement: WeightStatement;
  say: (statement: WeightStatement) => void;
  locked: boolean;
}

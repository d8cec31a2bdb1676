import { foldName } from './codes.ts';
import { lengthOf, MAX_CRITERION_LENGTH, MAX_UNIT_LENGTH } from './limits.ts';

/** What the figures of an entered criterion are; a rating’s are its steps, 0 to 4. */
export type FigureKind = 'number' | 'rating' | 'text';

/** A criterion that the study already has; a computed one takes no figures from a file. */
export interface ExistingCriterion {
  readonly id: string;
  readonly name: string;
  readonly unit: string;
  readonly kind: FigureKind | 'computed';
  /** Names of a rating's steps 0 to 4. */
  readonly steps?: readonly string[] | null | undefined;
}

/** The criterion that a column fills: one of the study's, or one to be made. */
export interface FilledCriterion {
  readonly id: string | null;
  readonly name: string;
  readonly unit: string;
  /** Null where the cells are yet to tell. */
  readonly kind: FigureKind | null;
}

/** Leaves room for " (999)" behind a name. */
const STEM_LENGTH = MAX_CRITERION_LENGTH - 6;

/**
 * Says which criterion each column of figures fills. "Cost to first launch (M€)" is the study's "Cost to first
 * launch" where that is in M€, or where one of the two gives no unit. A column that meets a criterion in another
 * unit, a computed one, or one that an earlier column fills, gets a new criterion of its own: figures in thousands
 * must not slip in among millions.
 */
export class CriterionNamer {
  readonly #existing: Map<string, ExistingCriterion>;
  readonly #used: Set<string>;
  readonly #filled = new Set<string>();

  constructor(existing: readonly ExistingCriterion[]) {
    this.#existing = new Map(existing.map((criterion) => [foldName(criterion.name), criterion]));
    this.#used = new Set(this.#existing.keys());
  }

  /** @param index the column's place from 0, for one without a heading */
  name(heading: string, index: number): FilledCriterion {
    const whole = heading.replace(/\s+/g, ' ');
    const { bare, unit } = splitUnit(whole);
    const found = this.#find(whole, '') ?? this.#find(bare, unit);
    if (found !== undefined && found.kind !== 'computed') {
      this.#filled.add(found.id);
      return { id: found.id, name: found.name, unit: found.unit, kind: found.kind };
    }
    return { id: null, name: this.#unused(cut(bare || `Column ${index + 1}`)), unit, kind: null };
  }

  /** Whether a heading names a criterion of the study that a column may fill. */
  knows(heading: string): boolean {
    const found = this.#existing.get(foldName(heading));
    return found !== undefined && found.kind !== 'computed';
  }

  #find(name: string, unit: string): ExistingCriterion | undefined {
    const found = this.#existing.get(foldName(name));
    if (found === undefined || found.kind === 'computed' || this.#filled.has(found.id)) return undefined;
    const agree = unit === '' || found.unit === '' || foldName(unit) === foldName(found.unit);
    return agree ? found : undefined;
  }

  #unused(stem: string): string {
    let name = stem;
    for (let copy = 2; this.#used.has(foldName(name)); copy += 1) name = `${stem} (${copy})`;
    this.#used.add(foldName(name));
    return name;
  }
}

/** The last brackets of a heading are its unit, where they are as short as one. */
export function splitUnit(heading: string): { bare: string; unit: string } {
  const [, bare, round, square] = /^(.*\S)\s*(?:\(([^()]+)\)|\[([^[\]]+)\])$/.exec(heading) ?? [];
  const unit = (round ?? square ?? '').trim();
  return bare === undefined || unit === '' || lengthOf(unit) > MAX_UNIT_LENGTH
    ? { bare: heading, unit: '' }
    : { bare, unit };
}

function cut(text: string): string {
  return [...text].slice(0, STEM_LENGTH).join('').trimEnd();
}

import type { SiteResult } from '#contract/evaluate.ts';
import type { MemoPaper } from '#contract/memo.ts';
import type { Ranking } from '#contract/ranking.ts';
import type { MembersAgreement } from '#contract/agreement-model.ts';
import type { FlownState } from '#contract/flown-results.ts';
import type { Evidence } from '#contract/evidence.ts';
import type { CriterionGroup } from '#contract/criterion.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import type { Sensitivity } from '#contract/sensitivity.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { Weights } from '#contract/weights.ts';

/** What a memo is written from: the same inputs, results and ranking that the screens show, of one revision. */
export interface MemoFacts {
  paper: MemoPaper;
  /** UTC day, ISO 8601. */
  date: string;
  /** Address of the installation, without a closing slash. */
  origin: string;
  study: {
    id: string;
    title: string;
    organisation: string;
    question: string;
    /** ISO 8601 day. */
    decideBy: string | null;
    /** Names of the leads. */
    leads: string[];
  };
  inputs: StudyInputs;
  /** Flight of every listed site by its id, orbits in the order of the manifest. */
  results: ReadonlyMap<string, SiteResult>;
  /** Flown ascents of every listed site by its id, a state an orbit; null where the losses are entered. */
  flown: ReadonlyMap<string, readonly FlownState[]> | null;
  /** Decimals of every criterion's figures, by its place. */
  decimals: readonly number[];
  ranking: Ranking;
  /** Every site under every weighed criterion, with what is known of entered figures. */
  figures: RankingFigures;
  groups: CriterionGroup[];
  /** The study's set. */
  weights: Weights;
  /** Of the study's set, drawn as the screens draw it by default. */
  sensitivity: Sensitivity;
  /** Files that support figures, the latest first, and how many there are. */
  evidence: { files: Pick<Evidence, 'siteId' | 'criterionId' | 'fileName' | 'sha256'>[]; total: number };
  /** Of the sets that members share. */
  members: MembersAgreement;
  /** SHA-256 of the canonical inputs, hexadecimal. */
  checksum: string;
}

/** Sites that a memo lists: beyond these the rest are counted and point to the CSV. */
export const MOST_RANKED = 40;
export const MOST_OTHERS = 20;

import type { MemoBlock, MemoModel, MemoSection } from '#contract/memo.ts';
import { listInWords } from '#contract/format.ts';
import { acceptabilityBlocks } from './acceptability.ts';
import { agreementBlocks } from './agreement.ts';
import { candidateBlocks } from './candidates.ts';
import { attributionBlocks, cautionBlocks, estimates, recomputeBlocks } from './closing-sections.ts';
import { criteriaBlocks } from './criteria.ts';
import { enteredBlocks } from './entered.ts';
import type { MemoFacts } from './facts.ts';
import { flightBlocks } from './flight.ts';
import { holdBlocks } from './holds.ts';
import { methodBlocks } from './method.ts';
import { opening } from './opening.ts';
import { printedSites } from './printed-sites.ts';
import { rankingBlocks, rankingDetail } from './ranking-blocks.ts';
import { recommendation } from './recommendation.ts';
import { requirementBlocks } from './requirement.ts';
import { weightBlocks } from './weights.ts';

/** Numbers tables and figures through the memo, in the order they are read. */
function numbered(sections: readonly MemoSection[]): MemoSection[] {
  const count = { table: 0, figure: 0 };
  const number = (block: MemoBlock): MemoBlock => {
    if (block.kind === 'table') return { ...block, number: ++count.table };
    if (block.kind === 'map' || block.kind === 'contributions') return { ...block, number: ++count.figure };
    return block;
  };
  return sections.map((section) => ({ ...section, blocks: section.blocks.map(number) }));
}

function sectionsOf(facts: MemoFacts): MemoSection[] {
  const printed = printedSites(facts);
  const detail = rankingDetail(facts);
  return numbered([
    { id: 'recommendation', heading: null, blocks: [...rankingBlocks(facts), estimates(facts)] },
    ...changeSection(facts),
    { id: 'candidates', heading: 'Candidate sites', blocks: candidateBlocks(facts, printed) },
    { id: 'requirement', heading: 'Requirement and assumptions', blocks: requirementBlocks(facts) },
    { id: 'criteria', heading: 'Criteria and ranking', blocks: [...criteriaBlocks(facts), ...detail] },
    { id: 'weights', heading: 'Weights and how they were set', blocks: weightBlocks(facts) },
    { id: 'agreement', heading: 'Agreement among members', blocks: agreementBlocks(facts) },
    { id: 'sensitivity', heading: 'Does the ranking hold?', blocks: holdBlocks(facts) },
    { id: 'acceptability', heading: 'Rank acceptability', blocks: acceptabilityBlocks(facts) },
    {
      id: 'flight',
      heading: 'Flight: Δv and payload',
      blocks: [estimates(facts), ...flightBlocks(facts, printed)],
    },
    { id: 'entered', heading: 'Entered figures, sources and evidence', blocks: enteredBlocks(facts) },
    { id: 'method', heading: 'Method and constants', blocks: methodBlocks(facts) },
    { id: 'cautions', heading: 'Cautions', blocks: cautionBlocks(facts) },
    { id: 'recompute', heading: 'How to recompute it', blocks: recomputeBlocks(facts) },
    { id: 'attributions', heading: 'Data and type', blocks: attributionBlocks() },
  ]);
}

/** What the recommendation rests on and what would change it, in plain words; nothing where nothing is ranked. */
function changeSection(facts: MemoFacts): MemoSection[] {
  if (facts.ranking.state !== 'ranked') return [];
  const { holds } = recommendation(facts);
  const blocks = holds.map((text): MemoBlock => ({ kind: 'paragraph', text: [text] }));
  return blocks.length === 0 ? [] : [{ id: 'change', heading: 'What would change it', blocks }];
}

/**
 * Writes the memo: every word and every printed digit of it.
 * @param facts inputs, results and ranking of one revision.
 * @returns the model that the PDF and the preview are drawn from; the same facts give the same model.
 */
export function composeMemo(facts: MemoFacts): MemoModel {
  const { study, inputs, date, paper } = facts;
  const by = study.organisation === '' ? '' : `${study.organisation}. `;
  return {
    paper,
    documentTitle: `${study.title}: draft memo, revision ${inputs.revision}`,
    status: 'Draft memo',
    titleBlock: {
      study: study.title,
      organisation: study.organisation,
      memo: 'Draft',
      date,
      revision: inputs.revision,
      prepared: study.leads.length === 0 ? 'no lead named' : listInWords(study.leads),
    },
    ...opening(facts),
    sections: sectionsOf(facts),
    foot: `${by}Draft, figures of revision ${inputs.revision}, ${date} UTC.`,
  };
}

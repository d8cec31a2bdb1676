import type { MemoBlock, MemoCaution } from '#contract/memo.ts';
import type { MemoFacts } from './facts.ts';

export const estimates = ({ flown }: Pick<MemoFacts, 'flown'>): MemoCaution => ({
  kind: 'caution',
  strong: 'Estimates for comparing sites, not flight data.',
  text:
    flown === null
      ? 'Closed formulas and entered losses; no ascent is flown.'
      : 'Closed formulas, and ascents flown by a point-mass model of the vehicle.',
});

const FURTHER: MemoCaution[] = [
  {
    kind: 'caution',
    strong: 'Nothing downrange is screened in this memo.',
    text: 'The regulator’s own method and licensed flight-safety analysts decide (14 CFR parts 420 and 450 in the United States; elsewhere the national authority).',
  },
  {
    kind: 'caution',
    strong: 'Distances for propellants and explosives',
    text: 'come from the site’s own safety case and are not in this memo.',
  },
];

/** What the figures are not. */
export const cautionBlocks = (facts: MemoFacts): MemoBlock[] => [estimates(facts), ...FURTHER];

/** How a reader comes to the same figures. */
export function recomputeBlocks({ study, inputs, origin, checksum, date }: MemoFacts): MemoBlock[] {
  const address = `${origin}/api/v1/studies/${study.id}`;
  const bearer = '-H "Authorization: Bearer $SPINWARD_KEY"';
  return [
    {
      kind: 'paragraph',
      text: [
        `The figures are of revision ${inputs.revision} of the study, read on ${date} (UTC). The inputs are kept as one canonical JSON text (RFC 8785) with a checksum: as long as the checksum is the same, so is every figure here. A personal key is made on the account page.`,
      ],
    },
    { kind: 'code', label: 'Checksum of the inputs, SHA-256', text: checksum },
    {
      kind: 'code',
      label: 'The inputs, and their checksum',
      text: `curl ${bearer} -o inputs.json ${address}/memo-inputs.json && sha256sum inputs.json`,
    },
    {
      kind: 'code',
      label: 'Flight, from the inputs alone',
      text: `jq .evaluate inputs.json | curl ${bearer} -H "Content-Type: application/json" --data-binary @- ${origin}/api/v1/evaluate`,
    },
    {
      kind: 'code',
      label: 'The ranking, with every figure, value, weight and term',
      text: `curl ${bearer} ${address}/ranking`,
    },
  ];
}

/** What the memo is made with. */
export const attributionBlocks = (): MemoBlock[] => [
  {
    kind: 'paragraph',
    text: [
      'Coast: Natural Earth, in the public domain, through world-atlas; coastline as in the data, no position taken. Type: IBM Plex, SIL Open Font License 1.1.',
    ],
  },
];

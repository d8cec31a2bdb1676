import { rankingFinding } from '#contract/ranking-words.ts';
import type { Ranking } from '#contract/ranking.ts';
import { leadInWords } from '#contract/what-if-words.ts';

/** What the study's ranking and the what-if's say, and how the lead moves between them. */
export function WhatIfFinding({ study, here }: { study: Ranking; here: Ranking }) {
  const finding = rankingFinding(here);
  const was = rankingFinding(study);
  const lead = leadInWords(study, here);
  return (
    <section className="wi-outcome" aria-label="What comes of it">
      <p className="wi-finding" role="status">
        <span className="sr-only">In this what-if: </span>
        {finding.leads !== null && <em>{finding.leads}</em>}
        {finding.rest}
      </p>
      <p className="wi-why">
        In the study: {was.leads}
        {was.rest} {lead}
      </p>
    </section>
  );
}

import { lazy, Suspense, useMemo } from 'react';
import { EmptyState, Panel } from '#components/ui/index.ts';
import type { SiteResult } from '#contract/evaluate.ts';
import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { nameOf } from '../words.ts';
import { FlownTable } from './FlownTable.tsx';
import type { FlownRow } from './results.ts';

// Geodesics and charts are asked for once there is a flight to draw.
const FlightFigures = lazy(() =>
  import('./FlightFigures.tsx').then(({ FlightFigures: Figures }) => ({ default: Figures })),
);

interface FlownSheetProps {
  studyId: string;
  inputs: StudyInputs;
  results: readonly SiteResult[];
  orbit: InputOrbit;
  rows: readonly FlownRow[];
  /** Still on its way. */
  reading: boolean;
  chosenCode: string;
  onChoose: (code: string) => void;
}

/** The flown ascents to one orbit: every site's figures, and one of them drawn. */
export function FlownSheet(props: FlownSheetProps) {
  const { studyId, inputs, results, orbit, rows, reading, chosenCode, onChoose } = props;
  const at = inputs.orbits.indexOf(orbit);
  const enteredKg = useMemo(
    () => new Map(inputs.sites.map(({ siteId }, i) => [siteId, results[i]?.orbits[at]?.payloadKg ?? null])),
    [inputs.sites, results, at],
  );
  const title = `Flown ascents to ${nameOf(orbit)}`;
  if (reading)
    return (
      <Panel title={title}>
        <p role="status">Reading the flown ascents…</p>
      </Panel>
    );
  const anything = rows.some(({ ascent }) => ascent && ascent.state !== 'missing');
  return (
    <>
      <Panel
        title={title}
        caption="Three degrees of freedom, every specific impulse in vacuum: back-pressure is a line of its own. The lines add up to the ideal Δv; a centrifugal gain stands with a minus. What is left at injection covers transfer, plane change and reserve."
      >
        {anything ? (
          <FlownTable
            rows={rows}
            label={title}
            enteredKg={enteredKg}
            chosenCode={chosenCode}
            onChoose={onChoose}
          />
        ) : (
          <EmptyState fact={`No ascent to ${nameOf(orbit)} has been flown yet.`}>
            Ask for the ascents above: each site then has its own losses, payload and trajectory here.
          </EmptyState>
        )}
      </Panel>
      {rows.some(({ ascent }) => ascent?.figures?.converged) && (
        <div className="mt-10">
          <Suspense fallback={<p role="status">Reading the flight…</p>}>
            <FlightFigures
              studyId={studyId}
              inputs={inputs}
              orbit={orbit}
              rows={rows}
              chosenCode={chosenCode}
              onChoose={onChoose}
            />
          </Suspense>
        </div>
      )}
    </>
  );
}

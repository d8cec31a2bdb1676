import { useState } from 'react';
import { Button, TableScroll } from '#components/ui/index.ts';
import { formatCount, formatFull, formatNumber } from '#contract/format.ts';
import type { StudyAscent } from '#contract/study-ascents.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { nameOf } from '../words.ts';
import type { FlownYear } from './results.ts';
import { stateInWords } from './words.ts';
import { SiteHead } from '../SiteHead.tsx';

const ROWS_AT_FIRST = 50;

function Cell({ ascent }: { ascent: StudyAscent | undefined }) {
  const payload = ascent?.figures?.payloadKg ?? null;
  const words = ascent ? stateInWords(ascent) : 'Not read yet.';
  return (
    <>
      {payload !== null && (
        <span
          className={ascent?.figuresAreStale ? 'text-ink-2 italic' : undefined}
          title={formatFull(payload)}
        >
          {formatNumber(payload)}
        </span>
      )}
      {words && <span className="sub ml-auto max-w-40 font-sans whitespace-normal">{words}</span>}
    </>
  );
}

interface FlownManifestProps {
  years: readonly FlownYear[];
  orbits: readonly InputOrbit[];
  chosenCode: string;
  onChoose: (code: string) => void;
}

/** Every site's flown payload to every orbit of the manifest. */
export function FlownManifest({ years, orbits, chosenCode, onChoose }: FlownManifestProps) {
  const [count, setCount] = useState(ROWS_AT_FIRST);
  return (
    <>
      <TableScroll label="Flown payload of the manifest">
        <table className="table" data-hover="">
          <thead>
            <tr>
              <th scope="col">Site</th>
              <th scope="col" className="num">
                Payload a year, flown<span className="unit">t</span>
              </th>
              {orbits.map((orbit) => (
                <th key={orbit.orbitId} scope="col" className="num">
                  {nameOf(orbit)}
                  <span className="unit">kg a flight</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {years.slice(0, count).map(({ site, ascents, payloadPerYearKg }) => (
              <tr key={site.siteId} aria-selected={site.code === chosenCode}>
                <th scope="row">
                  <SiteHead site={site} onChoose={onChoose} />
                </th>
                <td className="num font-medium">
                  {payloadPerYearKg === null ? '–' : formatNumber(payloadPerYearKg / 1000, 1)}
                </td>
                {orbits.map((orbit, at) => (
                  <td key={orbit.orbitId} className="num">
                    <Cell ascent={ascents[at]} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      <p className="caption mt-3">
        A year’s payload stands once every orbit is flown; one without payload counts zero.
      </p>
      {years.length > count && (
        <div className="mt-3 flex items-center gap-4">
          <Button onClick={() => setCount(count + 200)}>Show 200 more sites</Button>
          <span className="caption">
            {formatNumber(count)} of {formatCount(years.length, 'site')}, largest flown payload first
          </span>
        </div>
      )}
    </>
  );
}

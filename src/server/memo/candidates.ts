import { decimalsNeeded } from '#core/printed/figure.ts';
import { formatCount, formatLatitude, formatLongitude, formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoMap, MemoPad, MemoTable } from '#contract/memo.ts';
import { cell, figure, figures, markOf as rowMark, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { drawMap, type MapDrawing } from './map.ts';
import { leftOut, type PrintedSite, type PrintedSites } from './printed-sites.ts';

/** Width of an A4 page's text, points; on Letter the figure is drawn a little larger. */
const MAP_WIDTH = 504;

/** "35–120, 200–250", or all round. */
export const sectorsInWords = (sectors: readonly (readonly [number, number])[]): string =>
  sectors.length === 0
    ? 'all round'
    : sectors
        .map(
          ([from, to]) =>
            `${formatNumber(from, decimalsNeeded([from]))}–${formatNumber(to, decimalsNeeded([to]))}`,
        )
        .join(', ');

/** The candidates on a map of any width: the listed ones by name, the others as dots. */
export function candidatesMap({ inputs }: MemoFacts, { sites }: PrintedSites, width: number): MapDrawing {
  const listed = new Set(sites.map(({ site }) => site.siteId));
  const markOf = ({ standing }: PrintedSite): MemoPad['mark'] =>
    standing === 'leads' || standing === 'ranked' ? standing : 'other';
  return drawMap(
    sites.map((one) => ({ ...one.site, mark: markOf(one) })),
    inputs.sites.filter(({ siteId }) => !listed.has(siteId)),
    width,
  );
}

function mapFigure(facts: MemoFacts, printed: PrintedSites): MemoMap {
  const { inputs } = facts;
  const { sites } = printed;
  const drawn = candidatesMap(facts, printed, MAP_WIDTH);
  const unnamed = drawn.pads.filter(({ label }) => label === null).length;
  return {
    kind: 'map',
    number: 0,
    caption: 'Where the candidates lie',
    description: `Map of ${formatCount(inputs.sites.length, 'candidate site')}; the table of candidates gives each one's latitude and longitude.`,
    ...drawn,
    notes: [
      `Codes as in the table of candidates. ${sites.some(({ standing }) => standing === 'leads') ? 'Filled triangle: leads. ' : ''}Equidistant cylindrical projection; coast: Natural Earth.`,
      ...(unnamed > 0 ? [`${formatCount(unnamed, 'pad')} too close to others to be named here.`] : []),
      ...(printed.left > 0 ? [`${formatCount(printed.left, 'further site')} as dots.`] : []),
    ],
  };
}

/** Decimals of degrees: what the figures need, at least two and at most five (about a metre). */
const degreeDecimals = (degrees: readonly number[]): number => Math.max(2, decimalsNeeded(degrees, 5));

function candidatesTable({ sites, left }: PrintedSites): MemoTable {
  const decimals = degreeDecimals(sites.flatMap(({ site }) => [site.latitudeDeg, site.longitudeDeg]));
  const elevation = decimalsNeeded(
    sites.map(({ site }) => site.elevationM),
    1,
  );
  return table(
    'The candidates',
    [
      words('Code', 9, true),
      words('Site', 24, true),
      figures('Latitude', 'geodetic', 13, true),
      figures('Longitude', '', 14, true),
      figures('Elevation', 'm', 9),
      words('Permitted azimuths', 16, false, '° from north'),
      figures('Rotation speed', 'm/s', 9),
      figures('Geocentric latitude', '°', 11),
    ],
    sites.map((printed) => {
      const { site, result } = printed;
      return row(
        [
          cell(site.code),
          cell(site.name),
          cell(formatLatitude(site.latitudeDeg, decimals)),
          cell(formatLongitude(site.longitudeDeg, decimals)),
          cell(figure(site.elevationM, elevation)),
          cell(sectorsInWords(site.permittedAzimuthsDeg)),
          cell(result ? formatNumber(result.rotationSpeedMps, 1) : '–'),
          cell(result ? formatNumber(result.geocentricLatitudeDeg, 3) : '–'),
        ],
        rowMark(printed),
      );
    }),
    [
      'WGS 84; elevation above the ellipsoid. Rotation speed: due east, at the pad. Azimuths count clockwise.',
      ...leftOut(left),
    ],
  );
}

/** The candidates: where they lie, and what is known of each place. */
export function candidateBlocks(facts: MemoFacts, printed: PrintedSites): MemoBlock[] {
  if (facts.inputs.sites.length === 0)
    return [{ kind: 'paragraph', text: ['The study has no candidate sites yet.'] }];
  return [mapFigure(facts, printed), candidatesTable(printed)];
}

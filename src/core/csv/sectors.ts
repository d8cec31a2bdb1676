import { MAX_SECTORS } from './limits.ts';
import { plainMinus, readNumber, shown } from './numbers.ts';

/** A permitted sector of launch azimuth: clockwise from the first to the second, degrees from north, 0 to 360. */
export type Sector = readonly [fromDeg: number, toDeg: number];

export type SectorsReading =
  | { readonly kind: 'read'; readonly sectors: readonly Sector[] }
  | { readonly kind: 'refused'; readonly message: string };

const ALL_ROUND = /^(?:all|any|all[ -]?(?:a)?round|all azimuths|any azimuth|360)$/i;

/**
 * Reads permitted azimuths such as `35-120; 200-250`, with `;`, `/` or `|` between sectors, a hyphen, dash or "to"
 * within one, with or without degree marks. Nothing, "all" and "all round" are no sectors, which permits them all.
 *
 * @returns the sectors, each 0 to 360 and not empty, or what is wrong
 * @see the product's rule on sectors: from = to is none, save 0–360, which is all round
 */
export function readSectors(text: string, decimalComma = false): SectorsReading {
  const whole = text.trim();
  if (whole === '' || ALL_ROUND.test(whole)) return { kind: 'read', sectors: [] };
  const parts = whole.split(/[;/|]/).map((part) => part.trim());
  const sectors: Sector[] = [];
  for (const part of parts.filter((written, i) => written !== '' || i < parts.length - 1)) {
    const sector = readSector(part, decimalComma);
    if (typeof sector === 'string') return { kind: 'refused', message: sector };
    sectors.push(sector);
  }
  if (sectors.length > MAX_SECTORS) {
    return {
      kind: 'refused',
      message: `${sectors.length} permitted sectors; a site has at most ${MAX_SECTORS}.`,
    };
  }
  return { kind: 'read', sectors };
}

/** Writes sectors as the CSV does; readSectors reads the same ones back. */
export function writeSectors(sectors: readonly Sector[]): string {
  return sectors.map(([fromDeg, toDeg]) => `${fromDeg}-${toDeg}`).join('; ');
}

function readSector(part: string, decimalComma: boolean): Sector | string {
  const [, from, to] = /^(.+?)(?:\s*-\s*|\s+to\s+)(.+)$/i.exec(plainMinus(part.replace(/[°º˚]/g, ''))) ?? [];
  const fromDeg = readNumber(from ?? '', decimalComma);
  const toDeg = readNumber(to ?? '', decimalComma);
  if (fromDeg === undefined || toDeg === undefined) {
    return `Permitted azimuths “${shown(part)}” is no sector. Write from and to in degrees, such as 35-120; 200-250.`;
  }
  const written = `Permitted azimuths ${fromDeg}–${toDeg}`;
  if (fromDeg < 0 || toDeg < 0 || fromDeg > 360 || toDeg > 360) {
    return `${written.replaceAll('-', '−')}: azimuths run from 0 to 360, clockwise from north.`;
  }
  const whole = fromDeg === 0 && toDeg === 360;
  if (!whole && (fromDeg - toDeg) % 360 === 0) {
    return `${written}: from and to are the same. Write 0–360 for all round.`;
  }
  return [fromDeg, toDeg];
}

/** What a sites file may hold; the browser and the server refuse by the same figures. */
export const MAX_FILE_BYTES = 5 * 1024 * 1024;
export const MAX_ROWS = 10_000;
export const MAX_COLUMNS = 200;
export const MAX_NAME_LENGTH = 120;
export const MAX_CRITERION_LENGTH = 80;
export const MAX_UNIT_LENGTH = 20;
export const MAX_TEXT_LENGTH = 2_000;
export const MAX_SECTORS = 12;
/** From below the Dead Sea shore to above any summit. */
export const MIN_ELEVATION_M = -500;
export const MAX_ELEVATION_M = 9_000;
/** Sites nearer to each other than this are pointed out. */
export const NEAR_KM = 1;

/** Length as people and the database count it: code points, not UTF-16 units. */
export function lengthOf(text: string): number {
  let length = 0;
  for (let i = 0; i < text.length; i += 1) {
    const unit = text.charCodeAt(i);
    if (unit < 0xdc00 || unit > 0xdfff) length += 1;
  }
  return length;
}

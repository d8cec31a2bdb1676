/** A title without what file systems refuse. */
export const fileNameOf = (title: string): string =>
  title.replace(/[^\p{L}\p{N}_-]+/gu, ' ').trim() || 'study';

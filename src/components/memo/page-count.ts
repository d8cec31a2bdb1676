import { formatCount } from '#contract/format.ts';

const NUMBERS = [
  '',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];

/** "seven pages"; figures from thirteen on. */
export function pagesInWords(pages: number): string {
  const word = NUMBERS[pages];
  return word ? `${word} page${pages === 1 ? '' : 's'}` : formatCount(pages, 'page');
}

/**
 * Asks for the PDF's head, which makes the file ready too, and says in the finding how many pages it has. Without an
 * answer the finding stays as it is: the button still fetches the file.
 */
export async function showPageCount(): Promise<void> {
  const place = document.querySelector<HTMLElement>('[data-memo-pages]');
  const address = place?.dataset['memoPages'];
  if (!place || !address) return;
  const answer = await fetch(address, { method: 'HEAD' }).catch(() => null);
  const pages = Number(answer?.headers.get('x-memo-pages'));
  if (!answer?.ok || !(pages > 0)) return;
  const before = place.textContent;
  place.textContent = `, ${pagesInWords(pages)}`;
  document.title = document.title.replace(`Draft memo${before}.`, `Draft memo, ${pagesInWords(pages)}.`);
}

import type { MemoBlock, MemoSection } from '#contract/memo.ts';

/** A block with the heading of the section it opens. */
export interface Item {
  heading: string | null;
  block: MemoBlock;
}

/** Lines after which a long section or a long table starts on a page of its own. */
const RUN = 90;
const LONG = 25;

/** About how many table rows' height a block takes. */
function linesOf(block: MemoBlock): number {
  switch (block.kind) {
    case 'table':
      return block.rows.length + block.notes.length + 5;
    case 'contributions':
      return block.bars.length + 5;
    case 'map':
      return 18;
    case 'formulas':
      return block.items.length * 2;
    default:
      return 3;
  }
}

/**
 * Cuts the memo into runs of pages that are laid out one by one. Finding page breaks costs the square of a run's
 * length, so a long memo is many short runs: each begins a new page, with a long table or a long section.
 */
export function pageRuns(sections: readonly MemoSection[]): Item[][] {
  const runs: Item[][] = [];
  let lines = 0;
  for (const { heading, blocks } of sections) {
    const section = blocks.reduce((sum, block) => sum + linesOf(block), 0);
    blocks.forEach((block, at) => {
      const opens = at === 0 ? section > LONG : linesOf(block) > LONG;
      if (runs.length === 0 || (opens && lines + linesOf(block) > RUN)) {
        runs.push([]);
        lines = 0;
      }
      runs.at(-1)?.push({ heading: at === 0 ? heading : null, block });
      lines += linesOf(block);
    });
  }
  return runs;
}

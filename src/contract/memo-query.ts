import type { MemoPaper } from './memo.ts';
import { z } from './zod.ts';

const PAPERS = ['a4', 'letter'] as const satisfies MemoPaper[];

/** What a memo's address takes. */
export const MemoQuery = z.object({
  paper: z.enum(PAPERS, `Paper is ${PAPERS.join(' or ')}.`).default('a4'),
});

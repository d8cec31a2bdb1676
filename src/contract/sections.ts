import { SECTION_KEYS } from './frame.ts';
import { z } from './zod.ts';

/** A study's sections with their lines of fact, as they stand at a revision. */
export const StudySections = z
  .object({
    revision: z.int(),
    savedAt: z.iso.datetime(),
    sections: z.array(
      z.object({
        key: z.enum(SECTION_KEYS),
        name: z.string(),
        href: z.string(),
        fact: z.string(),
        outstanding: z.boolean(),
      }),
    ),
  })
  .meta({ id: 'StudySections' });
export type StudySections = z.infer<typeof StudySections>;

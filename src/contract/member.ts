import { listOf } from './list.ts';
import { StudyRole } from './study.ts';
import { z } from './zod.ts';

export const MemberEmail = z
  .string()
  .trim()
  .toLowerCase()
  .max(254, 'A mail address has up to 254 characters.')
  .pipe(z.email('This is no mail address: it needs a name, an @ and a domain.'));

/** Someone in a study: active, pending (an address without an account yet) or deactivated by an administrator. */
export const StudyMember = z
  .object({
    id: z.uuid(),
    email: z.string(),
    name: z.string().nullable(),
    role: StudyRole,
    standing: z.enum(['active', 'pending', 'deactivated']),
    you: z.boolean(),
    addedAt: z.iso.datetime(),
    version: z.int(),
  })
  .meta({ id: 'StudyMember' });
export type StudyMember = z.infer<typeof StudyMember>;

export const MemberList = listOf(StudyMember);
export type MemberList = z.infer<typeof MemberList>;

export const MemberInput = z
  .strictObject({ email: MemberEmail, role: StudyRole })
  .meta({ id: 'MemberInput' });
export type MemberInput = z.infer<typeof MemberInput>;

export const MemberPatch = z
  .strictObject({ role: StudyRole, version: z.int().optional() })
  .meta({ id: 'MemberPatch' });
export type MemberPatch = z.infer<typeof MemberPatch>;

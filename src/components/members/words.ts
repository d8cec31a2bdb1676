import { formatCount } from '#contract/format.ts';
import type { MemberList, StudyMember } from '#contract/member.ts';
import type { StudyRole } from '#contract/study.ts';

/** What a role does beyond reading, filtering, exporting and computing, which every role may. */
export const ROLE_MEANINGS: Record<StudyRole, string> = {
  lead: 'All that an engineer does, and members, state, the study’s weights and memos',
  engineer: 'Requirement, sites, vehicle, criteria, figures, limits and uploads; own weights',
  reviewer: 'Own weights',
  reader: 'Nothing more; receives memos',
};

export const STANDING_NAMES: Record<StudyMember['standing'], string> = {
  active: 'Active',
  pending: 'Waiting for an account',
  deactivated: 'Deactivated',
};

export const nameOf = ({ name, email }: Pick<StudyMember, 'name' | 'email'>): string => name ?? email;

/** The sentence the screen opens with. */
export function membersFinding({ items, total }: MemberList): string {
  const waiting = items.filter(({ standing }) => standing === 'pending').length;
  const all = formatCount(total, 'member');
  return waiting === 0 ? `${all} in this study.` : `${all} in this study, ${waiting} waiting for an account.`;
}

/** Why the person looking can't leave: the study keeps a lead. Undefined where they can, or where not all are listed. */
export function mayNotLeave({ items, total }: MemberList): string | undefined {
  const leads = items.filter(({ role, standing }) => role === 'lead' && standing === 'active');
  const last = items.length === total && leads.length === 1 && leads[0]?.you === true;
  return last ? 'A study keeps a lead, and you are the last one. Make someone else lead first.' : undefined;
}

import { formatCount, formatDateTimeUtc, listInWords } from '#contract/format.ts';
import type { InvitationList, LeaderlessList } from '#contract/admin.ts';

/** A time in a column whose heading says UTC. */
export const at = (time: string): string => formatDateTimeUtc(time).replace(' UTC', '');

export function peopleFinding(
  people: number,
  invitations: InvitationList,
  leaderless: LeaderlessList,
): string {
  const parts = [formatCount(people, 'person has an account', 'people have an account')];
  const waiting = invitations.requests.length;
  if (waiting > 0)
    parts.push(formatCount(waiting, 'address waits for an invitation', 'addresses wait for one'));
  if (leaderless.total > 0)
    parts.push(formatCount(leaderless.total, 'study has no lead', 'studies have no lead'));
  return `${listInWords(parts)}.`;
}

import { formatCount, formatDateTimeUtc, listInWords } from '#contract/format.ts';
import type { InvitationList, LeaderlessList, Outbox } from '#contract/admin.ts';
import type { LibraryVehicleList } from '#contract/requirement.ts';

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

export function libraryFinding({ items, total }: LibraryVehicleList): string {
  const archived = items.filter((entry) => entry.archived).length;
  if (total === 0) return 'No vehicle in the library yet.';
  return `${formatCount(total, 'vehicle')} in the library${archived ? `, ${archived} archived` : ''}.`;
}

export function outboxFinding({ mailServer, kept, sent }: Outbox): string {
  if (mailServer) return `${formatCount(sent.total, 'message')} for the mail server.`;
  if (kept.total === 0) return 'No mail yet; without a mail server it would stay here.';
  return `${formatCount(kept.total, 'message')} stayed here, for want of a mail server.`;
}

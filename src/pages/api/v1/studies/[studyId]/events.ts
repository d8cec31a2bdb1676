import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { eventStream } from '#server/events/stream.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(({ locals, request }) => {
  const { userId, studyId } = requireMember(locals);
  const lastEventId = request.headers.get('last-event-id');
  return eventStream({ db: locals.db, userId, studyId, signal: request.signal, lastEventId });
}) satisfies APIRoute;

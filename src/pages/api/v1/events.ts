import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { eventStream } from '#server/events/stream.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(({ locals, request }) =>
  eventStream({
    db: locals.db,
    userId: requireUser(locals).userId,
    studyId: null,
    signal: request.signal,
    lastEventId: request.headers.get('last-event-id'),
  }),
) satisfies APIRoute;

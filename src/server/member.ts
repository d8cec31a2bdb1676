import { may, type StudyRight, type StudyRole } from '#server/access.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import { AppError, notFound } from '#server/errors.ts';

/** The actor within a study. */
export interface Member {
  memberId: string;
  studyId: string;
  userId: string;
  name: string;
  role: StudyRole;
}

/** The person signed in. The middleware let them through; this is for the type and as a second lock. */
export function requireUser(locals: App.Locals): SignedIn {
  if (!locals.user) throw new AppError('signed-out', 'Sign in first.');
  return locals.user;
}

/** The study's member, with at least the right asked for: where one route serves several rights. */
export function requireMember(locals: App.Locals, right: StudyRight = 'read'): Member {
  if (!locals.member) throw notFound();
  if (!may(locals.member.role, right))
    throw new AppError('forbidden', 'Your role in this study does not allow that. Nothing was changed.');
  return locals.member;
}

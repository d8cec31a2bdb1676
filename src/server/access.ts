/*
 * The one place that says who may do what. The middleware looks every request's route up here before anything else
 * runs; what is not listed does not exist. tests/server/access.test.ts walks every route × role × stranger.
 */

export type StudyRole = 'lead' | 'engineer' | 'reviewer' | 'reader';

/** What a study's member may be allowed, beyond the study's state: see the table of roles in README.md. */
export type StudyRight = 'read' | 'weigh' | 'input' | 'lead';

const RIGHTS: Record<StudyRole, ReadonlySet<StudyRight>> = {
  lead: new Set(['read', 'weigh', 'input', 'lead']),
  engineer: new Set(['read', 'weigh', 'input']),
  reviewer: new Set(['read', 'weigh']),
  reader: new Set(['read']),
};

export const may = (role: StudyRole, right: StudyRight): boolean => RIGHTS[role].has(right);

export type Rule = 'public' | 'signed-in' | 'administrator' | `study:${StudyRight}`;
type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
export type RouteRules = Partial<Record<Method, Rule>>;

const STUDY = '/api/v1/studies/[studyId]';

/** Every route, by Astro's route pattern, with the rule of each verb. HEAD follows GET. */
export const ROUTES: Readonly<Record<string, RouteRules>> = {
  // Pages
  '/': { GET: 'signed-in' },
  '/404': { GET: 'public' },
  '/500': { GET: 'public' },
  '/sign-in': { GET: 'public' },
  '/sign-up': { GET: 'public' },
  '/forgotten': { GET: 'public' },
  '/reset': { GET: 'public' },
  '/invitation/[token]': { GET: 'public' },
  '/studies': { GET: 'signed-in' },
  '/studies/[studyId]': { GET: 'study:read' },
  '/studies/[studyId]/members': { GET: 'study:read' },
  '/studies/[studyId]/requirement': { GET: 'study:read' },
  '/studies/[studyId]/sites': { GET: 'study:read' },
  '/studies/[studyId]/flight': { GET: 'study:read' },
  '/studies/[studyId]/downrange': { GET: 'study:read' },
  '/studies/[studyId]/criteria': { GET: 'study:read' },
  '/studies/[studyId]/ranking': { GET: 'study:read' },
  '/studies/[studyId]/memo': { GET: 'study:read' },
  '/account': { GET: 'signed-in' },
  '/admin/people': { GET: 'administrator' },
  '/admin/vehicles': { GET: 'administrator' },
  '/admin/outbox': { GET: 'administrator' },

  // Machines and islands
  '/api/health': { GET: 'public' },
  '/api/auth/[...all]': { GET: 'public', POST: 'public' },
  '/api/v1/openapi.json': { GET: 'public' },
  '/api/v1/evaluate': { POST: 'signed-in' },
  '/api/v1/ascents': { POST: 'signed-in' },
  '/api/v1/impact-point': { POST: 'signed-in' },
  '/api/v1/corridors': { POST: 'signed-in' },
  '/api/v1/decide': { POST: 'signed-in' },
  '/api/v1/pairwise': { POST: 'signed-in' },
  '/api/v1/concordance': { POST: 'signed-in' },
  '/api/v1/events': { GET: 'signed-in' },
  '/api/v1/studies': { GET: 'signed-in', POST: 'signed-in' },
  '/api/v1/vehicles': { GET: 'signed-in' },
  [STUDY]: { GET: 'study:read', PATCH: 'study:input', DELETE: 'study:lead' },
  [`${STUDY}/members`]: { GET: 'study:read', POST: 'study:lead' },
  // A member may take themselves out; taking out anyone else is the lead's (checked there).
  [`${STUDY}/members/[memberId]`]: { PATCH: 'study:lead', DELETE: 'study:read' },
  [`${STUDY}/orbits`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/orbits/[orbitId]`]: { GET: 'study:read', PATCH: 'study:input', DELETE: 'study:input' },
  [`${STUDY}/vehicle`]: { GET: 'study:read', PUT: 'study:input', DELETE: 'study:input' },
  [`${STUDY}/settings`]: { GET: 'study:read', PATCH: 'study:input' },
  [`${STUDY}/sites`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/sites/[siteId]`]: { GET: 'study:read', PATCH: 'study:input', DELETE: 'study:input' },
  [`${STUDY}/sites/remove`]: { POST: 'study:input' },
  [`${STUDY}/sites/restore`]: { POST: 'study:input' },
  [`${STUDY}/sites.csv`]: { GET: 'study:read' },
  [`${STUDY}/sites.geojson`]: { GET: 'study:read' },
  [`${STUDY}/uploads`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/uploads/[uploadId]`]: { GET: 'study:read', DELETE: 'study:input' },
  [`${STUDY}/uploads/[uploadId]/commit`]: { POST: 'study:input' },
  [`${STUDY}/uploads/[uploadId]/file`]: { GET: 'study:read' },
  [`${STUDY}/evidence`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/evidence/[evidenceId]`]: { DELETE: 'study:input' },
  [`${STUDY}/evidence/[evidenceId]/file`]: { GET: 'study:read' },
  [`${STUDY}/evaluation`]: { GET: 'study:read' },
  [`${STUDY}/evaluation/inputs`]: { GET: 'study:read' },
  [`${STUDY}/ascents`]: { GET: 'study:read', POST: 'study:input', DELETE: 'study:input' },
  [`${STUDY}/ascents/[siteId]/[orbitId]`]: { GET: 'study:read' },
  [`${STUDY}/ascents/[siteId]/[orbitId]/trajectory.csv`]: { GET: 'study:read' },
  [`${STUDY}/ascents/[siteId]/[orbitId]/trajectory.geojson`]: { GET: 'study:read' },
  [`${STUDY}/downrange/fan`]: { GET: 'study:read' },
  [`${STUDY}/downrange/corridor`]: { GET: 'study:read' },
  [`${STUDY}/downrange/corridor.geojson`]: { GET: 'study:read' },
  [`${STUDY}/downrange/surroundings`]: { GET: 'study:read' },
  [`${STUDY}/criteria`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/criteria/[criterionId]`]: { GET: 'study:read', PATCH: 'study:input', DELETE: 'study:input' },
  [`${STUDY}/criterion-groups`]: { GET: 'study:read', POST: 'study:input' },
  [`${STUDY}/criterion-groups/[groupId]`]: { PATCH: 'study:input', DELETE: 'study:input' },
  // The study's own set is the lead's to write (checked there, by the set asked for).
  [`${STUDY}/weights`]: { GET: 'study:read', PUT: 'study:weigh' },
  [`${STUDY}/weights/choice`]: { POST: 'study:lead' },
  [`${STUDY}/weights/members`]: { GET: 'study:read' },
  // A what-if is its maker's alone to change; others see it once it is shared (checked there).
  [`${STUDY}/what-ifs`]: { GET: 'study:read', POST: 'study:weigh' },
  [`${STUDY}/what-ifs/[whatIfId]`]: { GET: 'study:read', PATCH: 'study:weigh', DELETE: 'study:weigh' },
  [`${STUDY}/what-ifs/[whatIfId]/adopt`]: { POST: 'study:lead' },
  [`${STUDY}/ranking`]: { GET: 'study:read' },
  [`${STUDY}/sensitivity`]: { GET: 'study:read' },
  [`${STUDY}/memo.pdf`]: { GET: 'study:read' },
  [`${STUDY}/memo-inputs.json`]: { GET: 'study:read' },
  [`${STUDY}/sections`]: { GET: 'study:read' },
  [`${STUDY}/events`]: { GET: 'study:read' },

  // Account and administration
  '/api/v1/account': { GET: 'signed-in', PATCH: 'signed-in' },
  '/api/v1/account/keys': { GET: 'signed-in', POST: 'signed-in' },
  '/api/v1/account/keys/[keyId]': { DELETE: 'signed-in' },
  '/api/v1/invitations/[token]': { POST: 'public' },
  '/api/v1/admin/people': { GET: 'administrator' },
  '/api/v1/admin/people/[userId]': { PATCH: 'administrator' },
  '/api/v1/admin/invitations': { GET: 'administrator', POST: 'administrator' },
  '/api/v1/admin/invitations/[invitationId]': { DELETE: 'administrator' },
  '/api/v1/admin/leaderless': { GET: 'administrator', POST: 'administrator' },
  '/api/v1/admin/vehicles': { GET: 'administrator', POST: 'administrator' },
  '/api/v1/admin/vehicles/[vehicleId]': { GET: 'administrator', PATCH: 'administrator' },
  '/api/v1/admin/outbox': { GET: 'administrator' },
};

export interface Actor {
  userId: string;
  administrator: boolean;
}

export type Decision = 'allow' | 'signed-out' | 'forbidden' | 'not-found';

/** Astro hands out route patterns in lower case, parameters included. */
const BY_PATTERN = new Map(Object.entries(ROUTES).map(([pattern, rules]) => [pattern.toLowerCase(), rules]));

/** The verbs of a route; undefined where there is no such route. */
export function rulesOf(routePattern: string): RouteRules | undefined {
  const pattern = routePattern.length > 1 ? routePattern.replace(/\/$/, '') : routePattern;
  return BY_PATTERN.get(pattern.toLowerCase());
}

/** What a route asks of a request; undefined where the route or its verb does not exist. */
export const ruleOf = (routePattern: string, method: string): Rule | undefined =>
  rulesOf(routePattern)?.[(method === 'HEAD' ? 'GET' : method) as Method];

/**
 * Decides a request. A study's rule needs the actor's role in it; a stranger to the study, an administrator
 * included, gets the same answer as for a study that does not exist.
 */
export function decide(rule: Rule | undefined, actor: Actor | null, role: StudyRole | null): Decision {
  if (rule === undefined) return 'not-found';
  if (rule === 'public') return 'allow';
  if (!actor) return 'signed-out';
  if (rule === 'signed-in') return 'allow';
  if (rule === 'administrator') return actor.administrator ? 'allow' : 'not-found';
  if (!role) return 'not-found';
  return may(role, rule.slice('study:'.length) as StudyRight) ? 'allow' : 'forbidden';
}

import type { ZodOpenApiOperationObject, ZodOpenApiResponsesObject } from 'zod-openapi';
import { z } from '../zod.ts';

/** An answer that is no JSON: a file or a stream. */
export interface FileAnswer {
  type: string;
  description: string;
}

/** One verb of an address, in as few words as its document needs. */
export interface Operation {
  summary: string;
  description?: string;
  query?: z.ZodObject;
  body?: z.ZodType;
  /** A multipart body: what its parts are. */
  form?: z.ZodObject;
  answer?: z.ZodType | FileAnswer;
  /** The kind of JSON that an answer is; application/json unless said. */
  answerType?: string;
  /** 200 unless said; 204 goes without an answer. */
  status?: 200 | 201 | 202 | 204;
  /** Changes what exists: needs If-Match or `version`, and may be stale. */
  versioned?: boolean;
  /** Needs no sign-in. */
  open?: boolean;
}

export type Verb = 'get' | 'post' | 'put' | 'patch' | 'delete';
/** Addresses with `{parameters}`, each with its verbs. */
export type Operations = Readonly<Record<string, Partial<Record<Verb, Operation>>>>;

/** RFC 9457 problem details: what every refused request is answered with. */
export const Problem = z
  .object({
    type: z.string(),
    title: z.string().meta({ description: 'What happened, what was kept, what to do' }),
    status: z.int(),
    code: z.string().meta({ description: 'A stable word for the kind of error', examples: ['stale'] }),
    errors: z
      .array(z.object({ path: z.string(), message: z.string() }))
      .optional()
      .meta({ description: 'Fields at fault, by dotted path' }),
    current: z
      .unknown()
      .optional()
      .meta({ description: 'The present state of what a stale write meant to change' }),
    requestId: z.string().optional(),
  })
  .meta({ id: 'Problem' });

const PROBLEMS = {
  400: 'The body is not JSON',
  401: 'Signed out, or no valid personal key',
  403: 'Your role in this study does not allow it',
  404: 'There is no such thing, or you are no member of its study',
  409: 'Stale, locked by a review, archived, or in conflict; `code` says which',
  413: 'Larger than is read',
  422: 'Some of the input does not fit; `errors` names the fields',
  428: 'The write names no version: send If-Match or `version`',
} as const;

type ProblemStatus = keyof typeof PROBLEMS;

function problemsOf(
  address: string,
  verb: Verb,
  { open, body, form, versioned }: Operation,
): ProblemStatus[] {
  const writes = verb !== 'get';
  const inStudy = address.includes('{studyId}');
  const wanted: Record<ProblemStatus, boolean> = {
    400: body !== undefined,
    401: open !== true,
    403: inStudy && writes,
    404: address.includes('{'),
    409: writes && (inStudy || versioned === true),
    413: form !== undefined,
    422: true,
    428: versioned === true,
  };
  return Object.entries(wanted).flatMap(([status, is]) => (is ? [Number(status) as ProblemStatus] : []));
}

const isFile = (answer: z.ZodType | FileAnswer): answer is FileAnswer =>
  'type' in answer && !('parse' in answer);

function success({ answer, answerType = 'application/json', versioned }: Operation) {
  if (!answer) return { description: 'Done' };
  if (isFile(answer))
    return {
      description: answer.description,
      content: { [answer.type]: { schema: { type: 'string' as const } } },
    };
  const etag = { schema: { type: 'string' as const }, description: 'The version, for If-Match' };
  return {
    description: 'Done',
    content: { [answerType]: { schema: answer } },
    ...(versioned ? { headers: { ETag: etag } } : {}),
  };
}

function responsesOf(address: string, verb: Verb, operation: Operation): ZodOpenApiResponsesObject {
  const refused = problemsOf(address, verb, operation).map((status) => [
    String(status),
    { description: PROBLEMS[status], content: { 'application/problem+json': { schema: Problem } } },
  ]);
  return { [`${operation.status ?? 200}`]: success(operation), ...Object.fromEntries(refused) };
}

function parametersOf(address: string, { query, versioned }: Operation) {
  const names = [...address.matchAll(/\{(\w+)\}/g)].flatMap(([, name]) => name ?? []);
  const path = z.object(Object.fromEntries(names.map((name) => [name, z.string()])));
  const header = z.object({
    'If-Match': z
      .string()
      .optional()
      .meta({ description: 'The ETag of what is changed, or `version` in the body' }),
  });
  return {
    ...(names.length ? { path } : {}),
    ...(query ? { query } : {}),
    ...(versioned ? { header } : {}),
  };
}

/** An operation in OpenAPI's own words. */
export function describeOperation(
  address: string,
  verb: Verb,
  operation: Operation,
): ZodOpenApiOperationObject {
  const { summary, description, body, form, open } = operation;
  const content = body
    ? { 'application/json': { schema: body } }
    : form && { 'multipart/form-data': { schema: form } };
  return {
    summary,
    ...(description ? { description } : {}),
    tags: [address.split('/')[3]?.replace(/\W/g, '') ?? 'spinward'],
    ...(open ? { security: [] } : {}),
    requestParams: parametersOf(address, operation),
    ...(content ? { requestBody: { required: true, content } } : {}),
    responses: responsesOf(address, verb, operation),
  };
}

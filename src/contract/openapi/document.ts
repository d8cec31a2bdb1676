import { createDocument, type ZodOpenApiPathsObject } from 'zod-openapi';
import { EvaluateInput, EvaluateOutput } from '../evaluate.ts';
import { ascentOperations } from './ascents.ts';
import { corridorOperations } from './corridors.ts';
import { downrangeOperations } from './downrange.ts';
import { describeOperation, type Operations, type Verb } from './operation.ts';
import { peopleOperations } from './people.ts';
import { siteOperations } from './sites.ts';
import { studyOperations } from './study.ts';
import { studyAscentOperations } from './study-ascents.ts';
import { trajectoryFileOperations } from './trajectory-files.ts';
import { weighingOperations } from './weighing.ts';
import { whatIfOperations } from './what-ifs.ts';

/** Every address of the interface, described by the schemas that check its requests. */
export const operations: Operations = {
  '/api/v1/evaluate': {
    post: {
      summary: 'Sites, orbits and a vehicle in, flights out',
      description: 'Stateless. Estimates for comparing sites, not flight data.',
      body: EvaluateInput,
      answer: EvaluateOutput,
    },
  },
  ...ascentOperations,
  ...corridorOperations,
  ...downrangeOperations,
  ...weighingOperations,
  ...studyOperations,
  ...studyAscentOperations,
  ...trajectoryFileOperations,
  ...whatIfOperations,
  ...siteOperations,
  ...peopleOperations,
  '/api/v1/openapi.json': {
    get: {
      summary: 'This document',
      answer: { type: 'application/json', description: 'OpenAPI 3.1' },
      open: true,
    },
  },
};

function pathsOf(): ZodOpenApiPathsObject {
  const entries = Object.entries(operations).map(([address, verbs]) => [
    address,
    Object.fromEntries(
      Object.entries(verbs).map(([verb, operation]) => [
        verb,
        describeOperation(address, verb as Verb, operation),
      ]),
    ),
  ]);
  return Object.fromEntries(entries) as ZodOpenApiPathsObject;
}

/**
 * The OpenAPI 3.1 document of the interface.
 * @param server the public address
 */
export function openApiDocument(server: string) {
  return createDocument({
    openapi: '3.1.0',
    info: {
      title: 'Spinward',
      version: '0.1.0',
      description:
        'Launch-site trade studies over HTTP. The unit closes a field’s name. Lists take query, page and pageSize; writes to what exists carry If-Match with the ETag, or version in the body. Figures are estimates for comparing sites, not flight data.',
    },
    servers: [{ url: server }],
    security: [{ personalKey: [] }, { session: [] }],
    components: {
      securitySchemes: {
        personalKey: {
          type: 'http',
          scheme: 'bearer',
          description: 'A personal key, made on the account page',
        },
        session: { type: 'apiKey', in: 'cookie', name: 'spinward.session_token' },
      },
    },
    paths: pathsOf(),
  });
}

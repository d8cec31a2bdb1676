import {
  FanQuery,
  StudyCorridor,
  StudyCorridorQuery,
  StudyFan,
  StudySurroundings,
  SurroundingsQuery,
} from '../downrange.ts';
import type { Operations } from './operation.ts';

const DOWNRANGE = '/api/v1/studies/{studyId}/downrange';
const description = 'Screening only, not a flight safety analysis and no approval.';

export const downrangeOperations: Operations = {
  [`${DOWNRANGE}/fan`]: {
    get: {
      summary: 'A site’s azimuth fan: first land and people in the corridor at every whole degree',
      description,
      query: FanQuery,
      answer: StudyFan,
    },
  },
  [`${DOWNRANGE}/corridor`]: {
    get: {
      summary: 'A site’s flight corridor at one launch azimuth, with the settlements inside',
      description,
      query: StudyCorridorQuery,
      answer: StudyCorridor,
    },
  },
  [`${DOWNRANGE}/corridor.geojson`]: {
    get: {
      summary: 'The corridor as a file: what POST /api/v1/corridors answers for the same input',
      description,
      query: StudyCorridorQuery,
      answer: {
        type: 'application/geo+json',
        description: 'Exclusion zone and corridor (RFC 7946), with their figures as properties',
      },
    },
  },
  [`${DOWNRANGE}/surroundings`]: {
    get: {
      summary: 'Who lives about a site, its coast, and the study’s other sites',
      description,
      query: SurroundingsQuery,
      answer: StudySurroundings,
    },
  },
};

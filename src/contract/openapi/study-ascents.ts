import {
  AscentsAsked,
  AscentsCancelled,
  AscentsInput,
  AscentsQuery,
  AscentsScope,
  StudyAscentDetail,
  StudyAscents,
} from '../study-ascents.ts';
import type { Operations } from './operation.ts';

const ASCENTS = '/api/v1/studies/{studyId}/ascents';

export const studyAscentOperations: Operations = {
  [ASCENTS]: {
    get: {
      summary: 'Flown ascents by site and orbit: states, figures, counts and time left',
      query: AscentsQuery,
      answer: StudyAscents,
    },
    post: {
      summary: 'Ask for flown ascents: those named, or all that are missing',
      description:
        'They are flown in the background; the event stream tells when they move on. What is flown already for the same inputs is not flown again.',
      body: AscentsInput,
      answer: AscentsAsked,
      status: 202,
    },
    delete: {
      summary: 'Cancel what is asked for and not flown yet',
      query: AscentsScope,
      answer: AscentsCancelled,
    },
  },
  [`${ASCENTS}/{siteId}/{orbitId}`]: {
    get: { summary: 'A flown ascent with its trajectory', answer: StudyAscentDetail },
  },
};

import type { Operations } from './operation.ts';

const ASCENT = '/api/v1/studies/{studyId}/ascents/{siteId}/{orbitId}';

export const trajectoryFileOperations: Operations = {
  [`${ASCENT}/trajectory.csv`]: {
    get: {
      summary: 'A flown ascent’s trajectory as CSV',
      description: 'An estimate for comparing sites, not flight data.',
      answer: {
        type: 'text/csv',
        description: 'A row a moment, with its impact point; units in the heading',
      },
    },
  },
  [`${ASCENT}/trajectory.geojson`]: {
    get: {
      summary: 'A flown ascent as a feature collection (RFC 7946)',
      description: 'An estimate for comparing sites, not flight data.',
      answer: {
        type: 'application/geo+json',
        description: 'The trajectory with its heights, and the trace of its impact points',
      },
    },
  },
};

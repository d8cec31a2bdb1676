import { downrangeReferences } from '#core/references.ts';
import { CorridorInput, CorridorOutput } from '../corridor.ts';
import type { Operations } from './operation.ts';

export const corridorOperations: Operations = {
  '/api/v1/corridors': {
    post: {
      summary:
        'A launch point, an azimuth and a vehicle class in; the flight corridor and who lives in it out',
      description: `Stateless. Screening only, not a flight safety analysis and no approval. Sources: ${Object.values(downrangeReferences).join('; ')}.`,
      body: CorridorInput,
      answer: CorridorOutput,
      answerType: 'application/geo+json',
    },
  },
};

import { ascentReferences } from '#core/references.ts';
import { ImpactPoint, ImpactPointInput } from '../impact-point.ts';
import type { Operations } from './operation.ts';

export const ascentOperations: Operations = {
  '/api/v1/impact-point': {
    post: {
      summary: 'A state over the turning Earth in, where it would come down out',
      description: `Stateless. Screening only: no air, no winds, no malfunction turn; the regulator’s own method and licensed flight-safety analysts decide. Source: ${ascentReferences.impactPoint}.`,
      body: ImpactPointInput,
      answer: ImpactPoint,
    },
  },
};

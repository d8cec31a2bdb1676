import { ascentReferences } from '#core/references.ts';
import { AscentInput, AscentOutput } from '../ascent.ts';
import { ImpactPoint, ImpactPointInput } from '../impact-point.ts';
import type { Operations } from './operation.ts';

const { impactPoint, ascentBenchmark: _benchmark, ...ofAscents } = ascentReferences;

export const ascentOperations: Operations = {
  '/api/v1/ascents': {
    post: {
      summary: 'A site, an orbit and a vehicle in, the flown ascent out',
      description: `Stateless. Three degrees of freedom over the WGS 84 ellipsoid: vertical rise, kick, gravity turn, linear tangent; the payload as large as can be. An estimate for comparing sites, not flight data. Sources: ${Object.values(ofAscents).join('; ')}.`,
      body: AscentInput,
      answer: AscentOutput,
    },
  },
  '/api/v1/impact-point': {
    post: {
      summary: 'A state over the turning Earth in, where it would come down out',
      description: `Stateless. Screening only: no air, no winds, no malfunction turn; the regulator’s own method and licensed flight-safety analysts decide. Source: ${impactPoint}.`,
      body: ImpactPointInput,
      answer: ImpactPoint,
    },
  },
};

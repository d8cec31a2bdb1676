import { ListQuery } from '../list.ts';
import { WhatIf, WhatIfAdopted, WhatIfAdoption, WhatIfInput, WhatIfList, WhatIfPatch } from '../what-if.ts';
import type { Operations } from './operation.ts';

const WHAT_IFS = '/api/v1/studies/{studyId}/what-ifs';

export const whatIfOperations: Operations = {
  [WHAT_IFS]: {
    get: { summary: 'Your own what-ifs and the shared ones', query: ListQuery, answer: WhatIfList },
    post: {
      summary: 'Keep a what-if',
      description: 'Private unless `shared`. It never changes the study until a lead adopts it.',
      body: WhatIfInput,
      answer: WhatIf,
      status: 201,
    },
  },
  [`${WHAT_IFS}/{whatIfId}`]: {
    get: { summary: 'A what-if', answer: WhatIf },
    patch: {
      summary: 'Change, rename or share a what-if of your own',
      body: WhatIfPatch,
      answer: WhatIf,
      versioned: true,
    },
    delete: { summary: 'Let a what-if of your own go', status: 204, versioned: true },
  },
  [`${WHAT_IFS}/{whatIfId}/adopt`]: {
    post: {
      summary: 'Make a what-if the study’s own; a lead’s to do',
      description:
        'Writes weights, limits and figures and removes the sites left out, all or nothing. 409 where the what-if’s version or the study’s `revision` has moved since.',
      body: WhatIfAdoption,
      answer: WhatIfAdopted,
      versioned: true,
    },
  },
};

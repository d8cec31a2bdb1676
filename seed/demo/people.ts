import type { DemoPerson } from './shape.ts';

/** The people of the demo; every one is invented. */
export const people: DemoPerson[] = [
  { login: 'lead', name: 'I. Marsh' },
  { login: 'engineer', name: 'T. Okoye' },
  { login: 'reviewer', name: 'S. Nair' },
  { login: 'reader', name: 'L. Brandt' },
  { login: 'admin', name: 'P. Aalto', administrator: true },
];

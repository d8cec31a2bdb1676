import { DEMO_DOMAIN, DEMO_PASSWORD } from '#scripts/demo.ts';
import { env } from '#server/env.ts';

const DOES: Record<string, string> = {
  lead: 'Leads: inputs, members, the study’s weights',
  engineer: 'Enters: requirement, sites, criteria, uploads',
  reviewer: 'Weighs: weights of their own',
  reader: 'Reads: ranking and memo',
  admin: 'Administers: people, vehicles, outbox',
};

/** What the sign-in page shows in the demo, where the passwords are published; null anywhere else. */
export function demoSignIns() {
  if (env().SPINWARD_DEMO !== true) return null;
  const people = Object.entries(DOES).map(([name, does]) => ({ email: `${name}@${DEMO_DOMAIN}`, does }));
  return { password: DEMO_PASSWORD, people };
}

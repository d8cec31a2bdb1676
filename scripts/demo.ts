import type { StartEnv } from '#server/env.ts';

/** The demo's sign-ins, published in README.md; seed/ makes them. */
export const DEMO_DOMAIN = 'spinward.test';
export const DEMO_PEOPLE = ['lead', 'engineer', 'reviewer', 'reader', 'admin'] as const;
export const DEMO_PASSWORD = 'launch-site-demo';

type Settings = Pick<StartEnv, 'HOST' | 'DATABASE_URL' | 'SPINWARD_DEMO'>;

/** What the database holds, as far as the demo is concerned. */
export interface Contents {
  isEmpty: boolean;
  hasDemo: boolean;
}

/** An empty private database gets the demo unless it is refused; any other only where it is asked for. */
export const shouldSeed = (settings: Settings, contents: Contents): boolean =>
  contents.isEmpty && (settings.SPINWARD_DEMO ?? !settings.DATABASE_URL);

const isLoopback = (host: string): boolean =>
  host === 'localhost' || host === '::1' || /^127(\.\d+){3}$/.test(host);

/**
 * Why this server may not listen where it is told to: everyone knows the demo's passwords.
 * @returns the reason, or undefined where it may
 */
export function refuseHost(settings: Settings, contents: Contents): string | undefined {
  if (isLoopback(settings.HOST) || settings.SPINWARD_DEMO === true) return undefined;
  if (!contents.hasDemo && !shouldSeed(settings, contents)) return undefined;
  return (
    `HOST ${settings.HOST} can be reached from other machines, and the demo's passwords are published. ` +
    'Set SPINWARD_DEMO=1 to serve the demo there all the same, or SPINWARD_DEMO=0 with an empty SPINWARD_DATA to serve without it.'
  );
}

import { z } from 'zod';

// In a browser the content security policy forbids code made from strings; zod would probe for it and the probe
// is reported as a violation. Told so before the first schema is made, it does not try.
if (!('process' in globalThis)) z.config({ jitless: true });

export { z };

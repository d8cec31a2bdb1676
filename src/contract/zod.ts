import { z } from 'zod';

// In a browser the content security policy forbids code made from strings; zod would probe for it and the probe
// is reported as a violation. Told so before the first schema is made, it does not try.
if (!('process' in globalThis)) z.config({ jitless: true });

/** What is said where a value is of the wrong kind and its schema says nothing of its own. */
function wrongKind(issue: z.core.$ZodRawIssue): string | undefined {
  if (issue.code !== 'invalid_type') return undefined;
  if (issue.expected === 'number')
    return typeof issue.input === 'string' ? `“${issue.input}” is no number.` : 'A number is needed here.';
  if (issue.expected === 'int') return 'A whole number is needed here.';
  return issue.input === undefined ? 'This is needed.' : undefined;
}
z.config({ customError: wrongKind });

export { z };

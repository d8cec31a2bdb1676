/** A failed query's error carries its parameters, session tokens among them: they stay out of the log. */
export const withoutParameters = (text: string): string => text.replace(/\bparams:.*/g, 'params left out');

/** Writes one line for whoever reads the server's log. */
export function logError(entry: Readonly<Record<string, string>>): void {
  const kept = Object.entries(entry).map(([key, text]) => [key, withoutParameters(text)]);
  console.error(JSON.stringify(Object.fromEntries(kept)));
}

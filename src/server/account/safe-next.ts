/**
 * Where to go after signing in: the page that was asked for, if it is one of this origin. A browser reads "//host",
 * "/\host" and a tab or newline between the slashes as another host, so the answer is what the address parser makes
 * of it here.
 */
export function safeNext(next: string | null, fallback = '/studies'): string {
  if (!next?.startsWith('/')) return fallback;
  const here = 'http://this.invalid';
  let url: URL;
  try {
    url = new URL(next, here);
  } catch {
    return fallback;
  }
  if (url.origin !== here || url.pathname.startsWith('//')) return fallback;
  if (url.pathname.startsWith('/sign-in') || url.pathname.startsWith('/api/')) return fallback;
  return url.pathname + url.search + url.hash;
}

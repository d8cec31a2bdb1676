import { useCallback, useEffect, useState } from 'react';

/**
 * A piece of a screen's state that lives in the address, so that a link shows a colleague the same view.
 * @param name of the query parameter
 * @param initial what the server read from the address; null where it has none
 * @returns the value and how to set it; null takes it out of the address
 */
export function useAddressParam(
  name: string,
  initial: string | null,
): [string | null, (value: string | null) => void] {
  const [value, setValue] = useState(initial);
  useEffect(() => {
    const read = (): void => setValue(new URLSearchParams(location.search).get(name));
    window.addEventListener('popstate', read);
    return () => window.removeEventListener('popstate', read);
  }, [name]);
  const set = useCallback(
    (next: string | null) => {
      const url = new URL(location.href);
      if (next === null) url.searchParams.delete(name);
      else url.searchParams.set(name, next);
      history.replaceState(history.state, '', url);
      setValue(next);
    },
    [name],
  );
  return [value, set];
}

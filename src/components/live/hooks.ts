import { useCallback, useEffect, useRef, useState } from 'react';
import useSWR, { type SWRConfiguration } from 'swr';
import { apiFetch, ApiError } from './api.ts';
import { onStep } from './step.ts';

/**
 * Reads an address and keeps it fresh; null reads nothing. `data` stays while it is read again, so that old figures
 * can stand, marked stale. `fallbackData` is what the page already drew.
 */
export function useApi<T>(address: string | null, options?: SWRConfiguration<T, ApiError>) {
  return useSWR<T, ApiError>(address, (key: string) => apiFetch<T>(key), {
    keepPreviousData: true,
    shouldRetryOnError: (error: ApiError) => error.status === 0 || error.status >= 500,
    ...options,
  });
}

/** Keeps the page's title equal to a finding that an island computes. */
export function useFinding(finding: string) {
  useEffect(() => {
    const [, ...rest] = document.title.split(' · ');
    document.title = [finding, ...rest].join(' · ');
  }, [finding]);
}

/** Calls `take` with 1 or −1 when n or p is pressed outside a field. */
export function useStep(take: (step: 1 | -1) => void) {
  const latest = useRef(take);
  useEffect(() => {
    latest.current = take;
  });
  useEffect(() => onStep((step) => latest.current(step)), []);
}

/**
 * For one action of a screen: whether it is under way, and the refusal it met. `run` answers whether it was done; any
 * error that is not the server's is a defect and goes on up.
 */
export function useAction() {
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<ApiError | null>(null);
  const run = useCallback(async (act: () => Promise<unknown>): Promise<boolean> => {
    setBusy(true);
    setError(null);
    try {
      await act();
      return true;
    } catch (caught) {
      if (!(caught instanceof ApiError)) throw caught;
      setError(caught);
      return false;
    } finally {
      setBusy(false);
    }
  }, []);
  return { busy, error, run };
}

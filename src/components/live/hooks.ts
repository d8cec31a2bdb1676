import { useEffect, useRef } from 'react';
import useSWR, { type SWRConfiguration } from 'swr';
import { apiFetch, type ApiError } from './api.ts';

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

const STEP = 'spinward:step';

/** Told by the n and p keys: the next or the previous site. */
export function announceStep(step: 1 | -1) {
  document.dispatchEvent(new CustomEvent<1 | -1>(STEP, { detail: step }));
}

/** Calls `onStep` with 1 or −1 when n or p is pressed outside a field. */
export function useStep(onStep: (step: 1 | -1) => void) {
  const latest = useRef(onStep);
  useEffect(() => {
    latest.current = onStep;
  });
  useEffect(() => {
    const hear = (event: Event) => {
      if (event instanceof CustomEvent) latest.current(event.detail as 1 | -1);
    };
    document.addEventListener(STEP, hear);
    return () => document.removeEventListener(STEP, hear);
  }, []);
}

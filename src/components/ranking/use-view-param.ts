import { useAddressParam } from '#components/live/address.ts';

/** A piece of a view's state in the address. Views are drawn in the browser alone, so it is read from there. */
export const useViewParam = (name: string): [string | null, (value: string | null) => void] =>
  useAddressParam(name, new URLSearchParams(location.search).get(name));

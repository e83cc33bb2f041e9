import { useCallback, useState } from 'react';

/**
 * A switch of the page that is kept in its address: reload and the back of a copied link show the same. The
 * first value comes from the server, which has read the same address.
 */
export function useAddressSwitch<Value extends string>(
  name: string,
  initial: Value,
  inAddress: (value: Value) => string | undefined,
): [Value, (value: Value) => void] {
  const [value, setValue] = useState(initial);
  const choose = useCallback(
    (next: Value) => {
      setValue(next);
      const url = new URL(window.location.href);
      const kept = inAddress(next);
      if (kept === undefined) url.searchParams.delete(name);
      else url.searchParams.set(name, kept);
      window.history.replaceState(window.history.state, '', url);
    },
    [name, inAddress],
  );
  return [value, choose];
}

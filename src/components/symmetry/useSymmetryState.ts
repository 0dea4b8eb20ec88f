import { useEffect, useRef, useState } from 'react';
import { addressOf, type SymmetryState, stateOf, withGroup } from './symmetry-address.ts';

/** The state of the symmetry page, kept in the address. A new group is a step that the way back takes back. */
export function useSymmetryState(search: string) {
  const [state, setState] = useState(() => stateOf(search));
  const group = useRef(state.group);
  useEffect(() => {
    const address = `${location.pathname}${addressOf(state)}${location.hash}`;
    if (group.current !== state.group) history.pushState(null, '', address);
    else history.replaceState(history.state, '', address);
    group.current = state.group;
  }, [state]);
  useEffect(() => {
    const back = () => {
      const earlier = stateOf(location.search);
      group.current = earlier.group;
      setState(earlier);
    };
    addEventListener('popstate', back);
    return () => removeEventListener('popstate', back);
  }, []);
  return {
    state,
    change: (part: Partial<SymmetryState>) => setState((old) => ({ ...old, ...part })),
    choose: (symbol: string) => setState((old) => withGroup(old, symbol)),
  };
}

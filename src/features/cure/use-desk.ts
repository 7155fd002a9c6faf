import { createContext, use, useEffect, useRef, useState } from 'react';
import { useLocation, useNavigate } from 'react-router-dom';
import { readDesk, writeDesk, type DeskState, type Tab, type Values } from './model/desk-state.ts';

export type Desk = DeskState & {
  set: (given: Partial<Values>) => void;
  openTab: (tab: Tab) => void;
};

/** Browsers stop a page that rewrites its address with every key. */
const settledMs = 300;

/**
 * The state of the desk. What is typed counts at once and reaches the address when the typing pauses; an address that
 * changes from outside (a link, the way back) is taken over.
 */
export function useDeskState(): Desk {
  const navigate = useNavigate();
  const { search } = useLocation();
  const [state, setState] = useState(() => readDesk(search));
  const inAddress = useRef(search.replace(/^\?/, ''));

  useEffect(() => {
    const now = search.replace(/^\?/, '');
    if (now === inAddress.current) return;
    inAddress.current = now;
    setState(readDesk(search));
  }, [search]);

  useEffect(() => {
    const wanted = writeDesk(state);
    if (wanted === inAddress.current) return;
    const timer = setTimeout(() => {
      inAddress.current = wanted;
      void navigate({ search: wanted }, { replace: true, preventScrollReset: true });
    }, settledMs);
    return () => clearTimeout(timer);
  }, [state, navigate]);

  const set = (given: Partial<Values>) => setState((now) => ({ ...now, values: { ...now.values, ...given } }));
  const openTab = (tab: Tab) => {
    const next = { ...state, tab };
    setState(next);
    // Press and focus both ask for the tab; the way back must be one step.
    const wanted = writeDesk(next);
    if (wanted === inAddress.current) return;
    inAddress.current = wanted;
    void navigate({ search: wanted }, { preventScrollReset: true });
  };
  return { ...state, set, openTab };
}

export const DeskContext = createContext<Desk | null>(null);

export function useDesk(): Desk {
  const desk = use(DeskContext);
  if (!desk) throw new Error('Outside of the cure desk');
  return desk;
}

import { useEffect, useRef } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { SheetBody, SheetStage } from '#contracts/sheets.ts';
import type { Fault } from '../model/faults.ts';
import { placeId } from './editor-context.ts';

/** The stage that is open stands in the address; a fault leads to its stage and its field. */
export function useStageLink(body: SheetBody) {
  const [search, setSearch] = useSearchParams();
  const wanted = search.get('stage');
  const stage: SheetStage | null = body.stages.find(({ key }) => key === wanted) ?? null;
  const jump = useRef<Fault | null>(null);
  useEffect(() => {
    if (jump.current) focusOn(jump.current);
    jump.current = null;
  }, [wanted]);
  const open = (key: string | null): void =>
    setSearch(
      (now) => {
        if (key === null) now.delete('stage');
        else now.set('stage', key);
        return now;
      },
      { replace: true },
    );
  const goTo = (fault: Fault): void => {
    if ((stage?.key ?? null) === fault.stage) return focusOn(fault);
    jump.current = fault;
    open(fault.stage);
  };
  return { stage, open, goTo };
}

/** Puts the focus on the first control of the place that a fault is about. */
function focusOn({ stage, way, field }: Fault): void {
  const place = document.getElementById(placeId(stage, way, field))?.parentElement;
  const target = place?.querySelector<HTMLElement>('input, select, textarea, button');
  target?.focus();
  place?.scrollIntoView({ block: 'center' });
}

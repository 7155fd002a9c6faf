import { useEffect, useRef, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { SheetBody, SheetStage } from '#contracts/sheets.ts';
import { useMedia } from '#src/lib/use-media.ts';
import type { Fault } from '../model/faults.ts';
import { placeId } from './editor-context.ts';

/** The stage that is open stands in the address; a fault leads to its stage and its field. */
export function useStageLink(body: SheetBody) {
  const [search, setSearch] = useSearchParams();
  const wanted = search.get('stage');
  // The address follows a moment later; what is done next must not wait for it.
  const [shown, setShown] = useState({ address: wanted, key: wanted });
  if (shown.address !== wanted) setShown({ address: wanted, key: wanted });
  const stage: SheetStage | null = body.stages.find(({ key }) => key === shown.key) ?? null;
  const jump = useRef<Fault | null>(null);
  const toForm = useRef(false);
  const isNarrow = useMedia('(max-width: 63.99rem)');
  useEffect(() => {
    if (jump.current) focusOn(jump.current);
    else if (toForm.current) document.getElementById('sheet-form')?.scrollIntoView({ block: 'start' });
    jump.current = null;
    toForm.current = false;
  }, [shown.key]);
  const open = (key: string | null): void => {
    // On a phone the form stands below the list.
    if (isNarrow && key !== shown.key) toForm.current = true;
    setShown({ address: wanted, key });
    setSearch(
      (now) => {
        if (key === null) now.delete('stage');
        else now.set('stage', key);
        return now;
      },
      { replace: true },
    );
  };
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
  for (let fold = place?.closest('details'); fold; fold = fold.parentElement?.closest('details')) fold.open = true;
  const target = place?.querySelector<HTMLElement>('input, select, textarea, button');
  target?.focus();
  place?.scrollIntoView({ block: 'center' });
}

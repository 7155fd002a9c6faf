import { Link2 } from 'lucide-react';
import { useEffect, useRef } from 'react';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { Page } from '#src/ui/page.tsx';
import { Tabs } from '#src/ui/tabs.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { BakesTab } from './bakes-tab.tsx';
import { CircuitTab } from './circuit-tab.tsx';
import { DewTab } from './dew-tab.tsx';
import { FlashTab } from './flash-tab.tsx';
import { LampTab } from './lamp-tab.tsx';
import { writeDesk } from './model/desk-state.ts';
import { TraceTab } from './trace-tab.tsx';
import { DeskContext, useDeskState } from './use-desk.ts';
import { useTraceFile } from './use-trace-file.ts';

export function Component() {
  const desk = useDeskState();
  const reader = useTraceFile();
  const calculators = useRef<HTMLDivElement>(null);
  // On a phone the row of tabs is longer than the screen.
  useEffect(() => {
    const chosen = calculators.current?.querySelector('[role=tab][aria-selected=true]');
    chosen?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }, [desk.tab]);
  const copy = () => {
    const search = writeDesk(desk);
    const link = `${location.origin}${location.pathname}${search && `?${search}`}`;
    navigator.clipboard.writeText(link).then(
      () => showToast('Link copied: it opens this very view.'),
      () => showToast('The browser did not let the link be copied. It is in the address bar.'),
    );
  };
  return (
    <DeskContext value={desk}>
      <Page
        title="Cure desk"
        about="Flash, bake, lamp and air, reckoned while you type"
        actions={
          <Button icon={<Link2 size={16} aria-hidden="true" />} onClick={copy}>
            Copy link
          </Button>
        }
      >
        <Caution>
          A planning aid that controls and certifies nothing: the maker&rsquo;s data sheet, local fire, electrical and
          environmental rules and your licensed people come first. Isocyanate coatings need supplied air. Nobody goes in
          during purge or bake; lamps and their leads are out of the booth before spraying. High-voltage batteries and
          plastic parts bear less heat.
        </Caution>
        <div ref={calculators}>
          <Tabs
            label="Calculators"
            value={desk.tab}
            onChange={desk.openTab}
            tabs={[
              { value: 'flash', label: 'Flash and cure', content: <FlashTab /> },
              { value: 'bakes', label: 'Bakes', content: <BakesTab /> },
              { value: 'lamp', label: 'Lamp', content: <LampTab /> },
              { value: 'dew', label: 'Dew point', content: <DewTab /> },
              { value: 'circuit', label: 'Circuit', content: <CircuitTab /> },
              { value: 'trace', label: 'Bake trace', content: <TraceTab reader={reader} /> },
            ]}
          />
        </div>
      </Page>
    </DeskContext>
  );
}

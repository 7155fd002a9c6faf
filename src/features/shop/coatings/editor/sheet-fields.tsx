import { energyOfSheet } from '#chemistry/sheets/energy-of-sheet.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import { PracticeNote } from './practice-note.tsx';
import { CoatsSection, CureSection, LimitsSection, NameSection, WindowsSection } from './sheet-sections.tsx';
import type { SheetFormState } from './use-sheet-form.ts';

/** The sheet in the order in which a maker prints it. `readOnly` for who may not keep it. */
export function SheetFields({ state, readOnly }: { state: SheetFormState; readOnly: boolean }) {
  const { form, faults, change, untouched, sheet } = state;
  const parts = { form, faults, change };
  return (
    <fieldset disabled={readOnly} className="flex min-w-0 flex-col gap-4">
      <legend className="sr-only">Figures of the data sheet</legend>
      <NameSection {...parts} />
      {!readOnly && <PracticeNote {...parts} untouched={untouched} />}
      <CoatsSection {...parts} />
      <WindowsSection {...parts} />
      <CureSection {...parts} />
      <LimitsSection {...parts} energyNow={sheet && energyWords(sheet)} />
    </fieldset>
  );
}

function energyWords(sheet: CoatingSheet): string {
  const { kilojoulesPerMole, from } = energyOfSheet({ ...sheet, kilojoulesPerMole: null });
  return from === 'fitted'
    ? `${kilojoulesPerMole.toFixed(1)}, fitted to the air dry and the bake.`
    : `${kilojoulesPerMole}, the default from memory: it takes an air dry and a faster bake to fit one.`;
}

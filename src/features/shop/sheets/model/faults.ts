import type { Coating } from '#contracts/coatings.ts';
import { sheetBody, type SheetBody, type SheetGround } from '#contracts/sheets.ts';
import { faultWhen, sheetFaultText } from '#src/lib/sheet-fault-texts.ts';
import type { Formats } from '#src/lib/formats.ts';
import { sheetFaults } from '#server/sheets/faults/sheet-faults.ts';

/** A fault as the editor shows it, at the field it is about and in the list. */
export type Fault = {
  severity: 'stop' | 'warn';
  code: string;
  stage: string | null;
  way: string | null;
  field: string;
  text: string;
  /** `with “Extra coats”`; empty where it is always there. */
  when: string;
};

/** Everything that is wrong with what stands in the editor: what the server would refuse, and what is only doubtful. */
export function faultsOf(
  draft: { name: string; body: SheetBody },
  coatings: readonly Coating[],
  ground: SheetGround | null,
  formats: Formats,
): Fault[] {
  return [
    ...(draft.name.trim() === '' ? [stop('name', null, null, 'Give the sheet a name.')] : []),
    ...shapeFaults(draft.body),
    ...sheetFaults(draft.body, coatings, ground)
      // Said already, and better, where there is no stage at all.
      .filter(({ code }) => code !== 'no-stage-left' || draft.body.stages.length > 0)
      .map((fault) => ({ ...fault, text: sheetFaultText(fault, formats), when: faultWhen(fault) })),
  ];
}

const stop = (field: string, stage: string | null, way: string | null, text: string): Fault => ({
  severity: 'stop',
  code: `shape-${field}`,
  stage,
  way,
  field,
  text,
  when: '',
});

/** What the contract does not take: empty titles, no ways, too many phases. Windows are told by the other faults. */
function shapeFaults(body: SheetBody): Fault[] {
  const issues = sheetBody.safeParse(body).error?.issues ?? [];
  return issues.flatMap(({ path }) => {
    const [first, index, inner, wayIndex, field] = path.map(String);
    if (first === 'parts') return [stop('parts', null, null, 'Each part needs a name, and 1 to 100 units of room.')];
    if (first === 'options') return [stop('options', null, null, 'Each option needs a name.')];
    if (first !== 'stages') return [stop('summary', null, null, 'The summary is too long: 400 letters at most.')];
    const stage = body.stages[Number(index)];
    if (!stage) return [stop('stages', null, null, 'A sheet has 1 to 60 stages. Add the first one.')];
    if (inner !== 'ways')
      return [stop(inner === 'title' ? 'title' : 'stage', stage.key, null, 'Give the stage a title and a kind.')];
    const way = stage.ways[Number(wayIndex)];
    if (!way) return [stop('ways', stage.key, null, 'A stage has 1 to 12 ways to do it. Add one.')];
    if (field === 'gap') return [];
    if (field === 'phases') return [stop('phases', stage.key, way.id, 'A way has 1 to 40 phases.')];
    if (field === 'label') return [stop('label', stage.key, way.id, 'Give the way a name.')];
    return [stop(field ?? 'ways', stage.key, way.id, 'This cannot be taken as it is.')];
  });
}

import type { SheetBody, SheetDetail } from '#contracts/sheets.ts';
import { same } from './same.ts';

/** What stands in the editor, and what it grew from. `id` is of the sheet that is, or will be, saved. */
export type SheetDraft = {
  id: string;
  name: string;
  body: SheetBody;
  base: { version: number; name: string; body: SheetBody };
};

const nothing: SheetBody = { summary: '', options: [], parts: [], stages: [] };

export const emptyDraft = (id: string): SheetDraft => ({
  id,
  name: '',
  body: nothing,
  base: { version: 0, name: '', body: nothing },
});

export const draftOf = ({ id, name, version, body }: SheetDetail): SheetDraft => ({
  id,
  name,
  body,
  base: { version, name, body },
});

export const isChanged = ({ name, body, base }: SheetDraft): boolean =>
  name.trim() !== base.name || !same(body, base.body);

/** Whether what was kept over a reload can be shown: its shape, not whether it could be saved. */
export function isDraft(value: unknown): value is SheetDraft {
  const draft = value as SheetDraft | null;
  return (
    typeof draft?.id === 'string' &&
    typeof draft.name === 'string' &&
    typeof draft.base?.version === 'number' &&
    [draft.body, draft.base.body].every(
      (body) =>
        Array.isArray(body?.options) &&
        Array.isArray(body.parts) &&
        Array.isArray(body.stages) &&
        body.stages.every(
          (stage) =>
            Array.isArray(stage?.ways) &&
            stage.ways.every(({ phases, gap }) => Array.isArray(phases) && typeof gap === 'object'),
        ),
    )
  );
}

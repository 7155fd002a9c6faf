import { createContext, use } from 'react';
import type { Coating } from '#contracts/coatings.ts';
import type { SheetBody, SheetGround } from '#contracts/sheets.ts';
import type { Edit } from '../model/body-edits.ts';
import type { Fault } from '../model/faults.ts';

/** What every part of the editor works with. */
export type EditorParts = {
  name: string;
  rename: (to: string) => void;
  body: SheetBody;
  /** `tag` names the field, so that typing in it is one step of undo. */
  edit: (edit: Edit, tag?: string) => void;
  undo: () => void;
  coatings: readonly Coating[];
  ground: SheetGround | null;
  faults: readonly Fault[];
  readOnly: boolean;
  /** A field whose text is no figure: nothing is saved until it is. */
  reportBroken: (field: string, broken: boolean) => void;
  /** Opens a stage; null: the sheet's own facts. */
  open: (stage: string | null) => void;
};

export const EditorContext = createContext<EditorParts | null>(null);

export function useEditor(): EditorParts {
  const parts = use(EditorContext);
  if (!parts) throw new Error('Outside of the editor of a process sheet');
  return parts;
}

/** Where faults of a field are shown, and where a jump from the list leads. */
export const placeId = (stage: string | null, way: string | null, field: string): string =>
  `place-${stage ?? 'sheet'}-${way ?? ''}-${field}`;

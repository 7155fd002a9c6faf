import type { Notes } from './field-notes.tsx';

/** Ids of the notes below a control, for its `aria-describedby`; empty where there are none. */
export const notesOf = (id: string, { hint, error }: Notes): string =>
  [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');

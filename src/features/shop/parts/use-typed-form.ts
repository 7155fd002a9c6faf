import { useState } from 'react';
import type * as z from 'zod';
import { useLocalDraft } from '#src/lib/local-draft.ts';

export type Faults<Form> = Partial<Record<keyof Form, string>>;
export type FormRead<Form, Value> = { value: Value; faults: null } | { value: null; faults: Faults<Form> };

/** What a schema makes of what was typed, or one fault for each field that is wrong. */
export function readWith<Form extends object, S extends z.ZodType>(schema: S, form: Form): FormRead<Form, z.output<S>> {
  const read = schema.safeParse(form);
  if (read.success) return { value: read.data, faults: null };
  const faults: Faults<Form> = {};
  for (const issue of read.error.issues) faults[issue.path[0] as keyof Form] ??= issue.message;
  return { value: null, faults };
}

/**
 * A form that is typed, half filled over a reload, and read as a whole. Faults show once somebody has tried to send it.
 * `name` tells forms apart; `initial` is what is true.
 */
export function useTypedForm<Form extends object, Value>(
  name: string,
  initial: Form,
  read: (form: Form) => FormRead<Form, Value>,
) {
  const isUsable = (value: unknown): value is Form =>
    typeof value === 'object' && value !== null && Object.keys(initial).every((key) => key in value);
  const draft = useLocalDraft(name, initial, isUsable);
  const [form, setForm] = useState(draft.start);
  const [isTried, setTried] = useState(false);
  const [sent, setSent] = useState<Faults<Form>>({});
  const result = read(form);
  const faults: Faults<Form> = isTried ? { ...result.faults, ...sent } : {};
  const change = (more: Partial<Form>) => {
    const next = { ...form, ...more };
    setForm(next);
    setSent({});
    draft.keep(next);
  };
  return {
    form,
    change,
    wasKept: draft.wasKept,
    /** Of the form, and what the server said of what was sent. */
    faults,
    tellFaults: (faults: Faults<Form>) => setSent(faults),
    submit: (send: (value: Value) => void) => {
      setTried(true);
      setSent({});
      if (result.value !== null) send(result.value);
    },
    /** When it was sent or let go. */
    drop: draft.drop,
    reset: (to: Form) => {
      setForm(to);
      setTried(false);
      setSent({});
      draft.drop();
    },
  };
}

/** What the server found wrong, by the form's own names: `body.zoneId` is `zoneId`. */
export function faultsOf<Form extends object>(fields: readonly { path: string; message: string }[]): Faults<Form> {
  const faults: Faults<Form> = {};
  for (const { path, message } of fields) {
    const name = path.split('.')[1] as keyof Form | undefined;
    if (name !== undefined) faults[name] ??= `${message.charAt(0).toUpperCase()}${message.slice(1)}.`;
  }
  return faults;
}

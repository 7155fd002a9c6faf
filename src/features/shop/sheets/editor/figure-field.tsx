import { useEffect, useId, useState } from 'react';
import { useFormats } from '#src/lib/session.ts';
import { TextField } from '#src/ui/text-field.tsx';
import { readDegrees, readMinutes, typeDegrees, typeMinutes } from '../model/typed.ts';
import { useEditor } from './editor-context.ts';

type FigureProps = {
  label: string;
  value: number | null;
  onChange: (value: number | null) => void;
  /** Empty means null; without it the field must hold a figure. */
  nullable?: boolean;
  hint?: string;
  hideLabel?: boolean;
  className?: string;
  placeholder?: string;
};
type Reading = { read: (text: string) => number | null; type: (value: number) => string; wrong: string };

/** A length of time, typed loosely: `45`, `1:30`, `3 h`, `2 d`. */
export const MinutesField = (props: FigureProps) => (
  <FigureField {...props} read={readMinutes} type={typeMinutes} wrong="Minutes, or like 1:30, 3 h, 2 d." />
);

/** A temperature in the reader's unit; the value is in C. */
export function DegreesField(props: FigureProps) {
  const { unit, temperature } = useFormats();
  return (
    <FigureField
      {...props}
      label={`${props.label}, °${unit}`}
      read={(text) => readDegrees(text, unit)}
      type={(celsius) => typeDegrees(celsius, unit)}
      wrong={`From ${temperature(20)} to ${temperature(200)}.`}
    />
  );
}

/** Keeps what is typed as it is typed; only a figure goes into the sheet, and anything else stands in the way of saving. */
function FigureField({ value, onChange, nullable = false, read, type, wrong, ...field }: FigureProps & Reading) {
  const { reportBroken } = useEditor();
  const id = useId();
  const [text, setText] = useState<string | null>(null);
  const meant = (typed: string): number | null | undefined => {
    if (typed.trim() === '') return nullable ? null : undefined;
    return read(typed) ?? undefined;
  };
  // Taken back by undo, or filled from the data sheet: then the value is shown, not what was typed before.
  const typed = text === null ? undefined : meant(text);
  const own = text !== null && (typed === undefined || typed === value);
  const shown = own ? text : value === null ? '' : type(value);
  const broken = own && typed === undefined;
  useEffect(() => {
    if (!broken) return;
    reportBroken(id, true);
    return () => reportBroken(id, false);
  }, [broken, id, reportBroken]);
  return (
    <TextField
      {...field}
      inputMode="text"
      autoComplete="off"
      value={shown}
      error={broken ? wrong : undefined}
      onChange={({ target }) => {
        setText(target.value);
        const next = meant(target.value);
        if (next !== undefined && next !== value) onChange(next);
      }}
      onBlur={() => {
        if (!broken) setText(null);
      }}
    />
  );
}

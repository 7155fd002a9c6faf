import { Plus, X } from 'lucide-react';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { readRows, writeRows } from './model/desk-state.ts';
import type { Errors } from './model/reader.ts';
import { shownIn, temperatureToken } from './model/typed.ts';
import { useDesk } from './use-desk.ts';

/** More bakes of one coat than anybody has had to do. */
const mostRows = 8;

/** Rows of minutes and metal temperature. */
export function BakeRows({ errors }: { errors: Errors }) {
  const { values, set } = useDesk();
  const { unit } = useFormats();
  const rows = readRows(values.bakes);
  const write = (next: string[][]) => set({ bakes: writeRows(next) });
  const put = (at: number, cell: number, text: string) =>
    write(rows.map((row, i) => (i === at ? [0, 1].map((j) => (j === cell ? text : (row[j] ?? ''))) : row)));
  return (
    <div className="flex flex-col gap-2">
      {rows.length === 0 && <p className="text-muted">No bake yet.</p>}
      {rows.map(([minutes = '', metal = ''], i) => (
        <div key={i} className="grid grid-cols-[minmax(0,1fr)_minmax(0,1fr)_auto] items-start gap-2">
          <TextField
            label={`Bake ${i + 1}, min`}
            inputMode="decimal"
            maxLength={12}
            value={minutes}
            error={errors[`bakes.${i}.minutes`]}
            onChange={(event) => put(i, 0, event.target.value)}
          />
          <TextField
            label={`Metal ${i + 1}, °${unit}`}
            inputMode="decimal"
            maxLength={12}
            value={shownIn(metal, unit)}
            error={errors[`bakes.${i}.celsius`]}
            onChange={(event) => put(i, 1, temperatureToken(event.target.value, unit))}
          />
          <div className="pt-[1.35rem]">
            <IconButton
              label={`Take bake ${i + 1} out`}
              icon={<X size={16} aria-hidden="true" />}
              onClick={() => write(rows.filter((_, at) => at !== i))}
            />
          </div>
        </div>
      ))}
      {rows.length < mostRows && (
        <Button
          size="small"
          className="self-start"
          icon={<Plus size={15} aria-hidden="true" />}
          onClick={() => write([...rows, rows.at(-1) ?? ['20', '60C']])}
        >
          Add a bake
        </Button>
      )}
    </div>
  );
}

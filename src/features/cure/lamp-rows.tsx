import { Plus, X } from 'lucide-react';
import { Button } from '#src/ui/button.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { readRows, writeRows } from './model/desk-state.ts';
import type { Errors } from './model/reader.ts';
import { useDesk } from './use-desk.ts';

const mostLamps = 12;

/** Lamps by their kilowatts. */
export function LampRows({ errors }: { errors: Errors }) {
  const { values, set } = useDesk();
  const rows = readRows(values.kws);
  const write = (next: string[][]) => set({ kws: writeRows(next) });
  return (
    <div className="flex flex-col gap-2">
      {rows.map(([kilowatts = ''], i) => (
        <div key={i} className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-2">
          <TextField
            label={`Lamp ${i + 1}, kW`}
            inputMode="decimal"
            maxLength={12}
            value={kilowatts}
            error={errors[`kws.${i}`]}
            onChange={(event) => write(rows.map((row, at) => (at === i ? [event.target.value] : row)))}
          />
          <div className="pt-[1.35rem]">
            <IconButton
              label={`Take lamp ${i + 1} out`}
              icon={<X size={16} aria-hidden="true" />}
              onClick={() => write(rows.filter((_, at) => at !== i))}
            />
          </div>
        </div>
      ))}
      {rows.length < mostLamps && (
        <Button
          size="small"
          className="self-start"
          icon={<Plus size={15} aria-hidden="true" />}
          onClick={() => write([...rows, rows.at(-1) ?? ['3']])}
        >
          Add a lamp
        </Button>
      )}
    </div>
  );
}

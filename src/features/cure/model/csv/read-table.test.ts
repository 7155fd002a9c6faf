import { describe, expect, it } from 'vitest';
import { traceOf } from '../trace.ts';
import { decodeText as decode } from '#src/lib/decode-text.ts';
import { readTable, type TraceTable } from './read-table.ts';

async function read(...lines: string[]): Promise<TraceTable> {
  const result = await readTable(lines.join('\n'), { breathe: () => Promise.resolve() });
  if (!result.ok) throw new Error(result.what);
  return result.table;
}
const trace = (table: TraceTable, unit: 'C' | 'F' | null = null) =>
  traceOf(table, { column: 0, unit, time: table.layout.time.unit }).trace.map(({ minutes, metalCelsius }) => [
    Number(minutes.toFixed(6)),
    Number(metalCelsius.toFixed(3)),
  ]);

describe('a logger file', () => {
  it('with semicolons, decimal commas and lines above the readings', async () => {
    const table = await read(
      'Logger;TX 4;v 1,2',
      'Serial;12345',
      '',
      'Time;Metal °C;Edge °C',
      '10:00:00;21,5;20,0',
      '10:00:30;30,25;24,0',
      '10:01:00;40;31,5',
    );
    expect(trace(table)).toEqual([
      [0, 21.5],
      [0.5, 30.25],
      [1, 40],
    ]);
    expect(table.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ['Metal °C', 'C'],
      ['Edge °C', 'C'],
    ]);
    expect(table.badCount).toBe(0);
  });

  it('with commas and quoted decimal commas', async () => {
    expect(trace(await read('t (s),"Temp, ""A"" C"', '0,"20,5"', '60,"60,0"'))).toEqual([
      [0, 20.5],
      [1, 60],
    ]);
  });

  it('with tabs, in Fahrenheit by its header: 140 F is 60 C', async () => {
    const table = await read('Elapsed min\tMetal (F)', '0\t68', '10\t140');
    expect(table.layout.delimiter).toBe('\t');
    expect(trace(table)).toEqual([
      [0, 20],
      [10, 60],
    ]);
  });

  it('without a header and without a unit is read by hand', async () => {
    const table = await read('0;68', '600;140');
    expect(table.columns[0]).toMatchObject({ name: 'Column 2', unit: null });
    expect(trace(table, 'F')).toEqual([
      [0, 20],
      [10, 60],
    ]);
    expect(trace(table)[1]).toEqual([10, 140]);
  });

  it('with the unit in a line of its own, or behind each reading', async () => {
    expect(trace(await read('Time;Panel', 's;°F', '0;68', '60;140'))[1]).toEqual([1, 60]);
    expect(trace(await read('Time;Panel', '0;68 °F', '60;140 °F'))[1]).toEqual([1, 60]);
  });

  it('passes by an index column and humidity', async () => {
    const table = await read('No.,Time,Humidity %,Panel C', '1,0,50,20', '2,60,48,60');
    expect(table.layout.time.name).toBe('Time');
    expect(table.columns.map(({ name }) => name)).toEqual(['Panel C']);
  });

  it('ends its lines in any way', async () => {
    for (const end of ['\n', '\r\n', '\r']) {
      const result = await readTable(['t;C', '0;20', '60;60', ''].join(end));
      expect(result.ok && result.table.rows).toBe(2);
    }
  });

  it('in UTF-16 or with a single-byte degree sign is text all the same', () => {
    expect(decode(Uint8Array.of(0xff, 0xfe, 0x54, 0, 0xb0, 0))).toBe('T°');
    expect(decode(Uint8Array.of(0x54, 0xb0, 0x43))).toBe('T°C');
    expect(decode(new TextEncoder().encode('\ufeffT°C'))).toBe('T°C');
  });
});

describe('times', () => {
  const minutesOf = async (...times: string[]) =>
    trace(await read('Time;C', ...times.map((time) => `${time};50`))).map(([minutes]) => minutes);

  it.each([
    ['seconds', ['0', '30', '90,5'], [0, 0.5, 1.508333]],
    ['HH:MM:SS', ['10:00:00', '10:00:30', '11:00:00.600'], [0, 0.5, 60.01]],
    ['HH:MM', ['9:05', '9:35'], [0, 30]],
    ['twelve hours', ['11:59:00 AM', '12:01:00 PM', '1:00:00 pm'], [0, 2, 61]],
    ['over midnight', ['23:59:30', '00:00:30', '00:01:30'], [0, 1, 2]],
    ['ISO', ['2026-03-12T10:00:00Z', '2026-03-12T10:10:30Z'], [0, 10.5]],
    ['ISO with a blank and offsets', ['2026-03-29 01:59:00+01:00', '2026-03-29 03:01:00+02:00'], [0, 2]],
    ['day first', ['31.03.2026 23:59:00', '01.04.2026 00:01:00'], [0, 2]],
    ['month first, where day first cannot be', ['3/31/2026 11:59 PM', '4/1/2026 12:01 AM'], [0, 2]],
    ['month first, where the bake would else take a month', ['3/11/2026 23:59', '3/12/2026 0:01'], [0, 2]],
  ])('as %s', async (_, times, expected) => {
    expect(await minutesOf(...times)).toEqual(expected);
  });

  it('of numbers go by the header', async () => {
    expect(trace(await read('Time [min];C', '0;20', '2,5;30'))[1]).toEqual([2.5, 30]);
    expect(trace(await read('Time (ms);C', '0;20', '60000;30'))[1]).toEqual([1, 30]);
    expect(trace(await read('Time (h);C', '0;20', '0.5;30'))[1]).toEqual([30, 30]);
    expect(trace(await read('Elapsed mm:ss;C', '0:00;20', '10:30;30'))[1]).toEqual([10.5, 30]);
  });

  it('may stand in two columns', async () => {
    const table = await read('Date;Time;C', '2026-03-12;23:59:00;20', '2026-03-13;00:01:00;30');
    expect(trace(table)[1]).toEqual([2, 30]);
  });
});

describe('lines that cannot be used', () => {
  it('are told one by one with their number, and the others count', async () => {
    const table = await read(
      'Time;Panel C;Edge C',
      '0;20;20',
      '60;OPEN;21',
      '120;;22',
      'pause;30;30',
      '90;31;31',
      '30;32;32',
      '180;6553.5;40',
      '240;50',
      'End of log',
    );
    expect(table.bad).toEqual([
      { line: 3, what: 'Panel C: “OPEN” is no number' },
      { line: 4, what: 'Panel C: no reading' },
      { line: 5, what: '“pause” is no time like those above it.' },
      { line: 6, what: 'The time goes back; the line was left out.' },
      { line: 7, what: 'The time goes back; the line was left out.' },
      { line: 8, what: 'Panel C: 6553.5 is no temperature of a panel' },
      { line: 9, what: 'Edge C: no reading' },
      { line: 10, what: '“End of log” is no time like those above it.' },
    ]);
    // The panel's own readings; the coldest of both only where both have one; the hottest of all.
    expect(trace(table)).toEqual([
      [0, 20],
      [4, 50],
    ]);
    const coldest = traceOf(table, { column: 'coldest', unit: null, time: 's' });
    expect(coldest.trace.map((row) => row.metalCelsius)).toEqual([20]);
    expect(coldest.hottestCelsius).toBe(50);
  });

  it.each([
    ['', 'The file is empty.'],
    ['hello\nworld', 'No line has a time and a temperature.'],
    ['Time;C\n0;20', 'Fewer than two lines could be used'],
  ])('leave nothing: %j', async (text, what) => {
    const result = await readTable(text);
    expect(result.ok ? '' : result.what).toContain(what);
  });
});

describe('100,000 rows', () => {
  const text = ['Time;Panel C', ...Array.from({ length: 100_000 }, (_, i) => `${i};${20 + (i % 50)},5`)].join('\n');

  it('are all read, the page breathing between slices', async () => {
    const seen: number[] = [];
    let breaths = 0;
    const result = await readTable(text, {
      onProgress: (share) => seen.push(share),
      breathe: () => Promise.resolve(void (breaths += 1)),
    });
    expect(result.ok && result.table.rows).toBe(100_000);
    expect(result.ok && result.table.time.at(-1)).toBe(99_999);
    expect(breaths).toBe(99);
    expect(seen).toEqual(seen.toSorted((a, b) => a - b));
    expect(seen.at(-1)).toBe(1);
  });

  it('can be stopped on the way', async () => {
    const stop = new AbortController();
    const reading = readTable(text, {
      signal: stop.signal,
      onProgress: () => stop.abort(),
      breathe: () => Promise.resolve(),
    });
    await expect(reading).rejects.toMatchObject({ name: 'AbortError' });
  });
});

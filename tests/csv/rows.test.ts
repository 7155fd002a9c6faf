import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import * as z from 'zod';
import { csvDay, csvNumber, csvWords, csvYesNo } from '#server/csv/fields.ts';
import { readRows } from '#server/csv/read-rows.ts';
import { writeRows } from '#server/csv/write-rows.ts';

const lamp = z.object({ name: z.string().max(20), kw: csvNumber, goodUntil: csvDay.optional() });
const faultsOf = (text: string) => readRows(text, lamp).faults;

describe('reading', () => {
  test.each([
    ['comma', 'name,kw\nLamp A,6'],
    ['semicolon', 'name;kw\nLamp A;6'],
    ['tab', 'name\tkw\nLamp A\t6'],
    ['a byte order mark', '\uFEFFname,kw\nLamp A,6'],
    ['CR LF and empty lines', 'name,kw\r\n\r\nLamp A,6\r\n\r\n'],
    ['other order and case', ' KW ;Name\n6;Lamp A'],
    ['empty columns at the right', 'name,kw,,\nLamp A,6,,'],
  ])('finds rows by their header: %s', (_, text) => {
    expect(readRows(text, lamp)).toMatchObject({
      lines: 1,
      rows: [{ value: { name: 'Lamp A', kw: 6 } }],
      faults: [],
    });
  });

  test('a comma inside a cell does not make the delimiter', () => {
    expect(readRows('name;kw\n"A, B";1,5', lamp).rows).toEqual([{ line: 2, value: { name: 'A, B', kw: 1.5 } }]);
  });

  // RFC 4180 section 2.6: line ends may stand inside quotation marks; each of the three ends of the trade.
  test.each(['\n', '\r\n', '\r'])('quoted line ends keep the numbers of lines right: %j', (end) => {
    const text = ['name,kw', `"a${end}b",1`, '', 'c,x', `"d${end}${end}e",2`, 'f,y'].join(end);
    const { rows, faults } = readRows(text, lamp);
    expect(rows.map(({ line }) => line)).toEqual([2, 6]);
    expect(faults.map(({ line, column }) => [line, column])).toEqual([
      [5, 'kw'],
      [9, 'kw'],
    ]);
  });

  test('says every fault of every line with the column as the file calls it', () => {
    expect(faultsOf('Name,KW,Good until\n,six,31.3.2027\nLamp,1,2027-02-30')).toEqual([
      { line: 2, column: 'Name', message: 'This must be filled in.' },
      { line: 2, column: 'KW', message: 'This must be a number.' },
      { line: 2, column: 'Good until', message: expect.stringContaining('year-month-day') },
      { line: 3, column: 'Good until', message: expect.stringContaining('year-month-day') },
    ]);
  });

  test.each([
    ['', 1, null, 'empty'],
    ['name\nLamp', 1, 'kw', 'missing'],
    ['name,kw,colour\nLamp,1,red', 1, 'colour', 'not known'],
    ['name,kw,Name\nLamp,1,Lamp', 1, 'Name', 'twice'],
    ['name,kw\nLamp,1,2', 2, null, 'more cells'],
    ['name,kw\nLamp,1\n"Lamp,2', 3, null, 'never closed'],
    ['name,kw\nLa"mp,1', 2, null, 'quotation mark'],
  ])('nothing is passed over in silence: %j', (text, line, column, words) => {
    expect(faultsOf(text)).toEqual([{ line, column, message: expect.stringContaining(words) }]);
  });

  test('takes 5,000 lines and not one more', () => {
    const file = (lines: number) => `name,kw\n${'Lamp,1\n'.repeat(lines)}`;
    expect(readRows(file(5_000), lamp)).toMatchObject({ lines: 5_000, faults: [] });
    expect(faultsOf(file(5_001))).toEqual([{ line: 1, column: null, message: expect.stringContaining('5001') }]);
  });
});

describe('cells', () => {
  test.each([
    ['1.5', 1.5],
    ['1,5', 1.5],
    ['0,125', 0.125],
    ['-3', -3],
    ['1 234,5', 1234.5],
    ['1234', 1234],
  ])('the number %j is %d', (text, value) => expect(csvNumber.parse(text)).toBe(value));
  test.each(['1,234', '1.234,5', '1,234.5', 'six', '', '1e3', '0x10', 'Infinity'])('%j is refused', (text) =>
    expect(csvNumber.safeParse(text).success).toBe(false),
  );
  test('words are divided, trimmed and there once', () =>
    expect(csvWords.parse('paint; prep, paint |sand;')).toEqual(['paint', 'prep', 'sand']));
  test('yes and no', () => {
    expect([csvYesNo.parse('Yes'), csvYesNo.parse('0')]).toEqual([true, false]);
    expect(csvYesNo.safeParse('maybe').success).toBe(false);
  });
});

describe('writing', () => {
  // OWASP ASVS 5.0, 1.2.10: these first characters make a spreadsheet run the cell.
  test.each(['=', '+', '-', '@', '\t', '\r'])('a cell that begins with %j is no formula', (sign) => {
    const csv = writeRows(['name'], [{ name: `${sign}1+cmd|'/c calc'!A1` }]);
    expect(csv.split('\r\n')[1]?.replace(/^"/, '')).toMatch(/^'/);
  });

  test('lists, answers and nothing', () => {
    const row = { name: 'A "b", c', skills: ['paint', 'prep'], trained: true, goodUntil: null };
    expect(writeRows(['name', 'skills', 'trained', 'goodUntil'], [row])).toBe(
      'name,skills,trained,good until\r\n"A ""b"", c","paint; prep",yes,\r\n',
    );
  });

  test('what goes out comes in unchanged, whatever it is', () => {
    const text = fc.oneof(
      fc.string({ unit: 'binary', minLength: 1 }),
      fc.stringMatching(/^['=+\-@,;" \n]{1,6}x$/),
      fc.constantFrom("'=1", "''+1", "'quoted", '=HYPERLINK("x")', 'a\nb', 'a;b\tc'),
    );
    const trimmed = text.map((value) => value.trim()).filter((value) => value !== '');
    const schema = z.object({ a: z.string(), b: z.string().optional() });
    fc.assert(
      fc.property(fc.array(fc.record({ a: trimmed, b: trimmed }), { minLength: 1 }), (rows) => {
        const read = readRows(writeRows(['a', 'b'], rows), schema);
        expect(read.faults).toEqual([]);
        expect(read.rows.map(({ value }) => value)).toEqual(rows);
      }),
      { seed: 20261201, numRuns: 500 },
    );
  });
});

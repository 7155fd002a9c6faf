import { describe, expect, it } from 'vitest';
import type { Reader } from '#src/lib/formats.ts';
import { tailgateSheet } from '../testing/sample-sheet.ts';
import { emptyForm, formPath, fromSheet, isJobForm, jobFormSchema, type JobForm } from './job-form.ts';
import { readCelsius, readDateTime, typeCelsius, typeDateTime } from './typed.ts';

const reader: Reader = { zone: 'Europe/Amsterdam', clock: '24', unit: 'C' };
const now = Date.parse('2026-03-12T08:33:20Z');
const id = '01958000-0001-7000-8000-0000000000aa';
const filled = (given: Partial<JobForm> = {}): JobForm => ({
  ...emptyForm(id, now, reader),
  ...fromSheet(tailgateSheet),
  title: 'Tailgate',
  ...given,
});
const faults = (form: JobForm, who = reader) =>
  jobFormSchema(who)
    .safeParse(form)
    .error?.issues.map((issue) => issue.path.join('.')) ?? [];

describe('a new job from a form', () => {
  it('takes sheet, options and parts from the sheet and arrives now', () => {
    expect(jobFormSchema(reader).parse(filled())).toMatchObject({
      id,
      sheetId: tailgateSheet.id,
      options: ['polish'],
      parts: [{ name: 'Tailgate', substrate: 'steel', units: 2 }],
      releaseAt: '2026-03-12T08:30:00.000Z',
      promiseAt: null,
      heatLimitCelsius: null,
    });
  });

  it('keeps local time across the clock change of 29 March 2026', () => {
    const promise = (day: string) => jobFormSchema(reader).parse(filled({ promise: { day, time: '17' } })).promiseAt;
    expect(promise('2026-03-28')).toBe('2026-03-28T16:00:00.000Z');
    expect(promise('2026-03-29')).toBe('2026-03-29T15:00:00.000Z');
  });

  it('means the end of the afternoon by a promise without a time', () => {
    expect(jobFormSchema(reader).parse(filled({ promise: { day: '2026-03-13', time: '' } })).promiseAt).toBe(
      '2026-03-13T15:00:00.000Z',
    );
  });

  it('finds every fault at its field at once', () => {
    const form = filled({
      sheetId: '',
      title: ' ',
      parts: [{ name: '', substrate: 'steel', units: '0' }],
      promise: { day: '2026-03-13', time: 'noonish' },
      electric: true,
      heatLimit: '500',
    });
    expect(faults(form).sort()).toEqual(['heatLimit', 'parts.0.name', 'parts.0.units', 'promise', 'sheetId', 'title']);
    expect(faults(filled({ parts: [] }))).toEqual(['parts']);
    expect(faults(filled({ promise: { day: '2026-03-11', time: '9' } }))).toEqual(['promise']);
    expect(faults(filled({ release: { day: '', time: '' } }))).toEqual(['release']);
  });

  it('holds a limit in Fahrenheit exactly and only for a vehicle with a battery', () => {
    const american: Reader = { ...reader, unit: 'F' };
    const job = jobFormSchema(american).parse(filled({ electric: true, heatLimit: '120', heatMinutes: '45' }));
    // 120 F is 48.889 C (several vehicle makers' figure); it must not become 49.
    expect(job.heatLimitCelsius).toBeCloseTo(48.8889, 4);
    expect(job.heatLimitMinutes).toBe(45);
    expect(typeCelsius(job.heatLimitCelsius, 'F')).toBe('120');
    expect(jobFormSchema(reader).parse(filled({ heatLimit: 'hot' })).heatLimitCelsius).toBeNull();
  });

  it('is known again after a reload, and nothing else is taken for it', () => {
    expect(isJobForm(JSON.parse(JSON.stringify(filled())))).toBe(true);
    expect(isJobForm({ ...filled(), parts: 'none' })).toBe(false);
    expect(isJobForm(null)).toBe(false);
  });
});

describe('what is typed', () => {
  it('is read as it is written', () => {
    const typed = typeDateTime('2026-03-12T13:05:00.000Z', reader);
    expect(typed).toEqual({ day: '2026-03-12', time: '14:05' });
    expect(readDateTime(typed, reader.zone, 0)).toEqual({ value: '2026-03-12T13:05:00.000Z' });
    expect(typeDateTime('2026-03-12T13:05:00.000Z', { ...reader, clock: '12' }).time).toBe('2:05 pm');
    expect(readDateTime({ day: '', time: '9' }, reader.zone, 0)).toHaveProperty('fault');
  });

  it('takes a comma and says the range in the own unit', () => {
    const range = { min: 20, max: 120 };
    expect(readCelsius('48,9', 'C', range)).toEqual({ value: 48.9 });
    expect(readCelsius('10', 'F', range)).toEqual({ fault: 'Write a temperature from 68 °F to 248 °F.' });
  });
});

describe('a field of the server’s answer', () => {
  it('is found in the form', () => {
    expect(formPath('body.promiseAt')).toBe('promise');
    expect(formPath('body.options.2')).toBe('options');
    expect(formPath('body.parts.0.units')).toBe('parts.0.units');
    expect(formPath('body.unheardOf')).toBeNull();
  });
});

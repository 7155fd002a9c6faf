import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { expect, it } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { renderPage } from '#src/testing/render-page.tsx';
import { newRecurrence, readRecurrence, type Measure, type RecurrenceForm } from './recurrence.ts';
import { RecurrenceEditor } from './recurrence-editor.tsx';

// The shop of the tests is in Berlin, where the clocks go forward on 29 March 2026.
const now = () => Date.parse('2026-03-12T08:00:00Z');

function Form({ measure = 'length', start }: { measure?: Measure; start: RecurrenceForm }) {
  const [value, setValue] = useState(start);
  const [isTried, setTried] = useState(false);
  const read = readRecurrence(value, measure);
  return (
    <form>
      <RecurrenceEditor
        value={value}
        onChange={setValue}
        measure={measure}
        mayBeAllDay
        faults={(isTried && read.faults) || {}}
      />
      <button type="button" onClick={() => setTried(true)}>
        Save
      </button>
      <output>{JSON.stringify(read.value)}</output>
    </form>
  );
}
const kept = () => JSON.parse(document.querySelector('output')?.textContent ?? 'null') as unknown;
const nextTimes = () =>
  within(screen.getByRole('list', { name: 'Next times' }))
    .getAllByRole('listitem')
    .map((item) => item.textContent);

it('makes a rule of everyday words, and shows the sentence and the next dates across the clock change', async () => {
  renderPage(<Form start={newRecurrence('2026-03-13')} />, { now });
  await userEvent.selectOptions(screen.getByLabelText('Happens'), 'on days of the week');
  const every = screen.getByLabelText('Every how many weeks');
  await userEvent.clear(every);
  await userEvent.type(every, '2');
  const length = screen.getByLabelText('For');
  await userEvent.clear(length);
  await userEvent.type(length, '2 h');
  expect(screen.getByRole('checkbox', { name: 'Friday' })).toBeChecked();
  expect(screen.getByText('Every 2 weeks on Friday at 7:00 for 2 h')).toBeInTheDocument();
  expect(nextTimes().slice(0, 3)).toEqual([
    'Fri 13 Mar, 7:00 to 9:00',
    'Fri 27 Mar, 7:00 to 9:00',
    'Fri 10 Apr, 7:00 to 9:00',
  ]);
  expect(kept()).toEqual({ startsLocal: '2026-03-13T07:00', rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=FR', minutes: 120 });
  await expectAccessible();
});

it('lets another first day take its weekday along, and whole days take no time', async () => {
  renderPage(<Form start={newRecurrence('2026-03-13', { repeat: 'monthly', monthBy: 'weekday' })} />, { now });
  expect(screen.getByText('On the second Friday of the month at 7:00 for 1 h')).toBeInTheDocument();
  const day = screen.getByLabelText('From day');
  await userEvent.clear(day);
  await userEvent.type(day, '2026-04-06');
  await userEvent.click(screen.getByRole('checkbox', { name: 'Whole days' }));
  expect(screen.getByText('On the first Monday of the month, all day')).toBeInTheDocument();
  expect(nextTimes().slice(0, 2)).toEqual(['Mon 6 Apr', 'Mon 4 May']);
  expect(screen.queryByLabelText('At')).not.toBeInTheDocument();
});

it('says beside the field what is wrong, once somebody tries to save', async () => {
  renderPage(<Form measure="end" start={newRecurrence('2026-03-13', { time: 'seven', end: '8' })} />, { now });
  expect(screen.queryByText('Enter a time, such as 7 or 7:30.')).not.toBeInTheDocument();
  await userEvent.click(screen.getByRole('button', { name: 'Save' }));
  expect(screen.getByLabelText('Time')).toHaveAccessibleDescription('Enter a time, such as 7 or 7:30.');
  expect(kept()).toBeNull();
  await expectAccessible();
});

it('keeps a rule that the fields cannot say', async () => {
  renderPage(
    <Form
      start={newRecurrence('2026-03-31', { repeat: 'own', rule: 'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-1' })}
    />,
    { now },
  );
  expect(nextTimes()[0]).toBe('Tue 31 Mar, 7:00 to 8:00');
  const rule = screen.getByLabelText('Rule');
  await userEvent.clear(rule);
  await userEvent.type(rule, 'FREQ=HOURLY');
  await userEvent.click(screen.getByRole('button', { name: 'Save' }));
  expect(rule).toHaveAccessibleDescription(/FREQ cannot be HOURLY/);
});

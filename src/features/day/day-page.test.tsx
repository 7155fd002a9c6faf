import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, test } from 'vitest';
import type { Role } from '#contracts/common.ts';
import type { DayView } from '#contracts/day.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi, type Sent } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component } from './day-page.tsx';
import { at, barAt, day, uuid, viewOf } from './testing/sample-day.ts';

const clear = barAt(1, 600, [
  ['setup', 10],
  ['spray', 20],
  ['flash', 15],
]);
const done = barAt(2, 480, [['spray', 20]], { state: 'done', placeId: uuid(1, 2) });
const draft = { id: uuid(9, 1), version: 3, changes: 1, late: 0, updatedAt: at(500), updatedBy: 'Imke', behind: false };
const drafted = viewOf([clear, done], { shown: 'draft', draft });

const api = (path: string) => `/api/shops/${shopId}${path}`;
const movePath = api(`/draft/stages/${clear.id}/move`);
const moved = { draft: { id: draft.id, version: 4 }, reasons: [], moved: [] };
type Answers = Parameters<typeof fakeApi>[0];

type Shown = { answers?: Answers; role?: Role; address?: string; wide?: boolean };

function show(view: DayView, { answers = {}, role = 'lead', address = `/day?date=${day}`, wide = true }: Shown = {}) {
  stubWidth(wide ? 1440 : 390);
  const fake = fakeApi({ [`GET ${api('/day')}`]: { body: view }, ...answers });
  renderPage(<Component />, { me: meAs(role), at: address, now: () => Date.parse(at(571)) });
  return fake;
}
const writes = (sent: Sent[]) => sent.filter((one) => one.method !== 'GET');
// Without layout the calendar library keeps its bars out of sight, where they have no role: found by their label,
// first in its place, then in its painter's row.
const bar = async (name: RegExp) => (await screen.findAllByLabelText(name))[0] ?? document.body;

test('a bar says job, part, stage, place, times, person and state', async () => {
  show(drafted);
  expect(
    await bar(/^Job 2401, tailgate, Clear coat, Booth bake, Booth 1, 10:00 to 10:45, Ada, planned/),
  ).toBeInTheDocument();
  expect(await bar(/^Job 2402, .*, done/)).toBeInTheDocument();
  expect(screen.getByText(/Draft, 1 change from posted plan 7/)).toBeVisible();
});

test('one bar is reached by Tab, arrows lead on, Enter opens it and its form moves it', async () => {
  const user = userEvent.setup();
  const { sent } = show(drafted, { answers: { [`POST ${movePath}`]: { body: moved } } });
  const first = await bar(/^Job 2401.*Booth 1/);
  await waitFor(() => expect(first).toHaveAttribute('tabindex', '0'));
  first.focus();
  await user.keyboard('{ArrowDown}');
  expect(document.activeElement?.getAttribute('aria-label')).toMatch(/^Job 2402/);
  await user.keyboard('{ArrowUp}{Enter}');
  const form = await screen.findByRole('form', { name: 'Move this stage' });
  const start = within(form).getByLabelText('Start');
  await user.clear(start);
  await user.type(start, '1115');
  await user.selectOptions(within(form).getByLabelText('Place'), 'Booth 2');
  await user.click(within(form).getByRole('button', { name: 'Move' }));
  await screen.findByText('2401 stands at today 11:15 in Booth 2.', { exact: false });
  expect(writes(sent)).toMatchObject([{ path: movePath, body: { version: 3, start: at(675), placeId: uuid(1, 2) } }]);
});

test('moving to where it is sends nothing', async () => {
  const user = userEvent.setup();
  const { sent } = show(drafted, { address: `/day?date=${day}&stage=${clear.id}` });
  await user.click(await screen.findByRole('button', { name: 'Move' }));
  expect(writes(sent)).toEqual([]);
});

test('where there is no draft one is opened first; undo sends the way back with the newest version', async () => {
  const user = userEvent.setup();
  let opened = false;
  const { sent } = show(viewOf([clear]), {
    address: `/day?date=${day}&stage=${clear.id}`,
    answers: {
      [`GET ${api('/day')}`]: () => {
        return {
          body: opened ? viewOf([clear], { shown: 'draft', draft: { ...draft, version: 1 } }) : viewOf([clear]),
        };
      },
      [`POST ${api('/draft')}`]: () => {
        opened = true;
        return { body: { id: draft.id, version: 1 } };
      },
      [`POST ${movePath}`]: (one: Sent) => {
        const { version } = one.body as { version: number };
        return { body: { ...moved, draft: { id: draft.id, version: version + 1 } } };
      },
    },
  });
  const start = await screen.findByLabelText('Start');
  await user.clear(start);
  await user.type(start, '9.30');
  await user.click(screen.getByRole('button', { name: 'Move' }));
  const undo = screen.getByRole('button', { name: 'Undo the last move' });
  await waitFor(() => expect(undo).toBeEnabled());
  await user.click(undo);
  await waitFor(() => expect(writes(sent)).toHaveLength(3));
  expect(writes(sent).map((one) => one.path)).toEqual([api('/draft'), movePath, movePath]);
  expect(writes(sent)[1]?.body).toMatchObject({ version: 1, start: at(570) });
  expect(writes(sent)[2]?.body).toMatchObject({ version: 2, start: at(600), placeId: clear.placeId });
});

test('a refusal says the reason in words with its rule, and the stage is back where it was', async () => {
  const user = userEvent.setup();
  const reason = {
    code: 'place-taken',
    rule: 4,
    stageId: clear.id,
    ids: [uuid(1, 2), done.id],
    names: ['Booth 2', '2402 clear coat'],
    at: [at(480), at(700)],
    minutes: [480, 700],
  };
  show(drafted, {
    address: `/day?date=${day}&stage=${clear.id}`,
    answers: { [`POST ${movePath}`]: apiError(422, 'refused', { reasons: [reason] }) },
  });
  await user.selectOptions(await screen.findByLabelText('Place'), 'Booth 2');
  await user.click(screen.getByRole('button', { name: 'Move' }));
  const alert = await screen.findByRole('alert');
  expect(alert).toHaveTextContent('Booth 2 is taken by 2402 clear coat until 11:40. (rule 4, one load at a time)');
  expect(await bar(/^Job 2401.*Booth 1, 10:00/)).toBeInTheDocument();
});

test('a draft that somebody changed meanwhile is fetched again, and that is said', async () => {
  const user = userEvent.setup();
  const { sent } = show(drafted, {
    address: `/day?date=${day}&stage=${clear.id}`,
    answers: { [`POST ${movePath}`]: apiError(409, 'stale', { current: { id: draft.id, version: 9 } }) },
  });
  await user.selectOptions(await screen.findByLabelText('Place'), 'Booth 2');
  const before = sent.filter((one) => one.query.get('from') === at(0)).length;
  await user.click(screen.getByRole('button', { name: 'Move' }));
  expect(await screen.findByRole('alert')).toHaveTextContent('Somebody else changed it in the meantime.');
  await waitFor(() => expect(sent.filter((one) => one.query.get('from') === at(0)).length).toBeGreaterThan(before));
});

test('who does not plan sees the posted plan and moves nothing', async () => {
  const { sent } = show(viewOf([clear]), { role: 'painter', address: `/day?date=${day}&stage=${clear.id}` });
  expect(await screen.findByText(/The paint lead moves stages/)).toBeVisible();
  expect(screen.queryByRole('button', { name: 'Plan the rest' })).toBeNull();
  expect(sent[0]?.query.get('plan')).toBe('posted');
});

test('on a phone the day is a list by place that opens the same form', async () => {
  const user = userEvent.setup();
  show(drafted, { wide: false });
  await user.click(await screen.findByRole('button', { name: /10:00 to 10:45/ }));
  const sheet = await screen.findByRole('dialog');
  expect(within(sheet).getByRole('form', { name: 'Move this stage' })).toBeVisible();
});

test('posting says which plan it became and how many letters go out; a shifted ground is explained', async () => {
  const user = userEvent.setup();
  const spot = { placeName: 'Booth 1', personName: 'Ada', from: clear.from, to: clear.to };
  const job = { jobId: clear.jobId, jobNumber: 2401, jobTitle: clear.jobTitle };
  const comparison = {
    draft: { id: draft.id, version: 3 },
    postedNumber: 7,
    moved: [{ ...job, stageId: clear.id, stageTitle: 'Clear coat', before: null, after: spot }],
    newlyLate: [{ ...job, promiseAt: at(900), endsAt: at(960) }],
    saved: [],
    told: ['Ada'],
    reasons: [],
  };
  let tries = 0;
  show(drafted, {
    answers: {
      [`GET ${api('/draft/compare')}`]: { body: comparison },
      [`POST ${api('/draft/post')}`]: () =>
        tries++ === 0 ? apiError(409, 'ground-shifted') : { body: { planNumber: 8, changed: 1, letters: 1 } },
    },
  });
  await user.click(await screen.findByRole('button', { name: 'Compare and post' }));
  const dialog = await screen.findByRole('dialog');
  expect(await within(dialog).findByText('Turn late')).toBeVisible();
  const post = within(dialog).getByRole('button', { name: 'Post this plan' });
  await user.click(post);
  expect(await within(dialog).findByRole('alert')).toHaveTextContent('The posted plan has changed');
  await user.click(post);
  expect((await screen.findAllByText(/Plan 8 is posted: 1 booking changed, 1 letter on the way/))[0]).toBeVisible();
});

test('an empty day offers the first step, and a failed one another try', async () => {
  const unplaced = [{ jobId: uuid(3, 9), jobNumber: 2409, jobTitle: 'Van, door', stageTitle: null, reason: null }];
  show(viewOf([], { unplaced }));
  expect(await screen.findByText('Nothing is booked for this time.')).toBeVisible();
  expect(screen.getByText('One job has no place yet')).toBeVisible();
});

test('an error keeps the page and offers another try', async () => {
  show(drafted, { answers: { [`GET ${api('/day')}`]: apiError(500, 'internal') } });
  expect(await screen.findByRole('alert')).toHaveTextContent('The booth day could not be loaded.');
  expect(screen.getByRole('button', { name: 'Try again' })).toBeVisible();
});

test('board and panel have no fault that a screen reader would stumble over', async () => {
  show(drafted, { address: `/day?date=${day}&stage=${clear.id}` });
  await screen.findByRole('form', { name: 'Move this stage' });
  await bar(/^Job 2401.*Booth 1/);
  await expectAccessible();
});

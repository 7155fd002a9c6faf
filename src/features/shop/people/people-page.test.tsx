import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Person } from '#contracts/people.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as People } from './people-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const id = (n: number) => `018f3a00-0000-7000-8000-00000000020${n}`;
const early = {
  startsLocal: '2026-01-05T07:00',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  minutes: 510,
  breaks: [{ after: 150, minutes: 15 }],
};
const person = (n: number, name: string, more: Partial<Person> = {}): Person => ({
  id: id(n),
  version: 3,
  name,
  skills: ['paint', 'prep'],
  sprayTrainedOn: '2025-01-10',
  training: { standing: 'good', goodThrough: '2030-01-10', daysLeft: 1400 },
  shifts: [early],
  absences: [],
  member: null,
  leavesOn: null,
  retired: false,
  ...more,
});
const tavi = person(1, 'Tavi');
const kelmo = person(2, 'Kelmo', {
  training: { standing: 'ends-soon', goodThrough: '2026-05-01', daysLeft: 50 },
  shifts: [{ ...early, rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO' }],
});
const list = `GET /api/shops/${shopId}/people`;
const roster = (people: Person[]) => ({
  body: {
    people,
    skills: ['paint', 'prep', 'polish'],
    members: [{ id: id(9), name: 'Imke', personId: null }],
    trainingBlocks: true,
  },
});
const now = () => Date.parse('2026-03-12T08:31:00Z');
const show = (role: 'owner' | 'lead' | 'painter' = 'owner', at = '/shop/people') =>
  renderPage(<People />, { me: meAs(role), at, now });

describe('people', () => {
  it('are listed with hours in words and the training that ends', async () => {
    fakeApi({ [list]: roster([tavi, kelmo]) });
    show();
    const row = await screen.findByRole('row', { name: /Tavi/ });
    expect(row).toHaveTextContent('Mon to Fri 7:00 to 15:30');
    expect(row).toHaveTextContent('good through Thu 10 Jan 2030');
    expect(screen.getByRole('row', { name: /Kelmo/ })).toHaveTextContent('50 days left');
    await expectAccessible();
  });

  it('are added, with skills as words and one day’s hours for the others', async () => {
    const { sent } = fakeApi({
      [list]: roster([tavi]),
      [`POST /api/shops/${shopId}/people`]: { body: { person: person(3, 'Brisa'), clashes: [] } },
    });
    show();
    const user = userEvent.setup();
    (await screen.findByRole('button', { name: 'Add a person' })).focus();
    await user.keyboard('{Enter}');
    const dialog = await screen.findByRole('dialog', { name: 'Somebody new' });
    await user.click(within(dialog).getByLabelText('Name'));
    await user.keyboard('Brisa{Tab}Paint{Enter}polish,');
    const monday = within(dialog).getByLabelText('Monday, hours and breaks');
    await user.clear(monday);
    await user.type(monday, '9-17');
    await user.click(within(dialog).getByRole('button', { name: 'Monday’s hours until Friday' }));
    await expectAccessible(dialog);
    within(dialog).getByRole('button', { name: 'Add to the roster' }).focus();
    await user.keyboard('{Enter}');
    await waitFor(() => expect(sent.some(({ method }) => method === 'POST')).toBe(true));
    expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
      name: 'Brisa',
      skills: ['paint', 'polish'],
      sprayTrainedOn: null,
      memberId: null,
      shifts: [{ startsLocal: '2026-03-09T09:00', rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR', minutes: 480, breaks: [] }],
    });
    await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  });

  it('say which field is wrong and send nothing', async () => {
    const { sent } = fakeApi({ [list]: roster([tavi]) });
    show('owner', `/shop/people?edit=${id(1)}`);
    const dialog = await screen.findByRole('dialog', { name: 'Tavi' });
    await userEvent.clear(within(dialog).getByLabelText('Name'));
    await userEvent.type(within(dialog).getByLabelText('Saturday, hours and breaks'), 'mornings');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save' }));
    expect(within(dialog).getByLabelText('Name')).toBeInvalid();
    expect(within(dialog).getByLabelText('Saturday, hours and breaks')).toBeInvalid();
    expect(sent.every(({ method }) => method === 'GET')).toBe(true);
  });

  it('keep what is typed over a reload, and hours that are more than a week', async () => {
    const { sent } = fakeApi({
      [list]: roster([tavi, kelmo]),
      [`PATCH /api/shops/${shopId}/people/${id(2)}`]: { body: { person: kelmo, clashes: [] } },
    });
    const first = show('owner', `/shop/people?edit=${id(2)}`);
    await userEvent.type(await screen.findByLabelText('Name'), ' the second');
    await waitFor(() => expect(JSON.stringify(sessionStorage)).toContain('the second'));
    first.unmount();
    show('owner', `/shop/people?edit=${id(2)}`);
    expect(await screen.findByLabelText('Name')).toHaveValue('Kelmo the second');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(sent.some(({ method }) => method === 'PATCH')).toBe(true));
    expect(sent.find(({ method }) => method === 'PATCH')?.body).toMatchObject({
      version: 3,
      name: 'Kelmo the second',
      shifts: kelmo.shifts,
    });
  });

  it('are away, and the posted work in that time is shown', async () => {
    const clash = {
      stageId: id(5),
      jobId: id(6),
      jobNumber: 2418,
      jobTitle: 'Left wing',
      stageTitle: 'Clear',
      from: '2026-03-16T09:00:00.000Z',
      to: '2026-03-16T10:00:00.000Z',
    };
    const { sent } = fakeApi({
      [list]: roster([tavi]),
      [`POST /api/shops/${shopId}/people/${id(1)}/absences`]: { body: { person: tavi, clashes: [clash] } },
    });
    show('lead');
    await userEvent.click(await screen.findByRole('button', { name: 'Away: Tavi' }));
    for (const [label, day] of [
      ['From, day', '2026-03-16'],
      ['To, day', '2026-03-17'],
    ] as const) {
      await userEvent.clear(screen.getByLabelText(label));
      await userEvent.type(screen.getByLabelText(label), day);
    }
    await userEvent.type(screen.getByLabelText('From, time'), '1230');
    await userEvent.click(screen.getByRole('button', { name: 'Enter' }));
    expect(await screen.findByRole('link', { name: '2418 Left wing' })).toBeVisible();
    expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
      from: '2026-03-16T11:30:00.000Z',
      to: '2026-03-17T23:00:00.000Z',
      reason: '',
    });
    await expectAccessible();
  });

  it('leave only once no posted work names them; the last of it is offered as the last day', async () => {
    const reason = {
      code: 'still-booked',
      rule: null,
      stageId: id(5),
      ids: [id(6)],
      names: ['Tavi', '2418 Left wing, Clear'],
      at: ['2026-03-16T09:00:00.000Z', '2026-03-16T10:00:00.000Z'],
      minutes: [],
    };
    const path = `POST /api/shops/${shopId}/people/${id(1)}/retire`;
    const { sent } = fakeApi({
      [list]: roster([tavi]),
      [path]: ({ body }) =>
        (body as { lastDay: string | null }).lastDay === null
          ? apiError(422, 'refused', { reasons: [reason] })
          : { body: { ...tavi, leavesOn: '2026-03-16' } },
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Leaves: Tavi' }));
    await userEvent.click(screen.getByRole('button', { name: 'Take off' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('Tavi has posted work: 2418 Left wing, Clear');
    await userEvent.click(screen.getByRole('button', { name: /their last day/ }));
    expect(screen.getByLabelText('Last day')).toHaveValue('2026-03-16');
    await userEvent.click(screen.getByRole('button', { name: 'Take off' }));
    await waitFor(() => expect(sent.at(-2)?.body).toEqual({ version: 3, lastDay: '2026-03-16' }));
  });

  it('are read by a lead, kept by an owner, closed to others', async () => {
    fakeApi({ [list]: roster([]) });
    const { unmount } = show('lead');
    expect(await screen.findByText('Nobody is on the roster yet')).toBeVisible();
    expect(screen.queryByRole('button', { name: 'Add a person' })).not.toBeInTheDocument();
    unmount();
    show('painter');
    expect(screen.getByText(/Only leads and owners/)).toBeVisible();
  });

  it('say so when they cannot be loaded', async () => {
    fakeApi({ [list]: 'unreachable' });
    show();
    expect(await screen.findByRole('alert')).toHaveTextContent('The people could not be loaded.');
  });
});

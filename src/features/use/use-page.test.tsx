import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { readUse } from '#contracts/use.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { sampleUse } from './testing/sample-use.ts';
import { Component as UsePage } from './use-page.tsx';

const report = readUse.reply.parse(sampleUse());
const address = `GET /api/shops/${shopId}/use`;
const now = () => Date.parse('2026-03-12T08:31:20Z');
const show = (at = '/use', role: 'owner' | 'painter' = 'owner') => renderPage(<UsePage />, { at, me: meAs(role), now });

describe('booth use', () => {
  it('shows the same figures as a drawing and as a table', async () => {
    fakeApi({ [address]: { body: report } });
    show();
    const row = await screen.findByRole('row', { name: /Booth 1/ });
    // 50 h open, 35.1 h of them used: 14.9 free, 70 %.
    expect(
      within(row)
        .getAllByRole('cell')
        .map((cell) => cell.textContent),
    ).toEqual(['11.4', '8.5', '1.3', '7.1', '3.9', '0', '4.2', '2.4', '50.0', '14.9', '70 %', '19 of 31']);
    expect(screen.getByRole('img', { name: /^Booth 1: spray 11\.4 h, bake 8\.5 h/ })).toBeVisible();
    expect(screen.getByRole('row', { name: /Booths, together/ })).toHaveTextContent('51 %');
    await expectAccessible();
  });

  it('says how much is recorded and how much is plan', async () => {
    fakeApi({ [address]: { body: report } });
    show();
    expect(await screen.findByText('54 of 88')).toBeVisible();
    expect(screen.getByText(/As of today 9:31; what lies ahead is the plan\./)).toBeVisible();
  });

  it('goes week by week, in the address and by local midnights', async () => {
    const { sent } = fakeApi({ [address]: { body: report } });
    const { router } = show();
    await screen.findByRole('table');
    expect(sent[0]?.query.get('from')).toBe('2026-03-08T23:00:00.000Z');
    await userEvent.click(screen.getByRole('button', { name: 'Previous week' }));
    await waitFor(() => expect(sent.at(-1)?.query.get('from')).toBe('2026-03-01T23:00:00.000Z'));
    expect(router.state.location.search).toBe('?from=2026-03-02');
  });

  it('says when nothing was booked, and when it could not be worked out', async () => {
    const idle = report.places.map((place) => ({
      ...place,
      bookings: 0,
      recorded: 0,
      hours: noHours,
      busyOpenHours: 0,
    }));
    fakeApi({ [address]: { body: { ...report, places: idle } } });
    const { unmount } = show();
    expect(await screen.findByText('Nothing was booked in this time')).toBeVisible();
    await expectAccessible();
    unmount();
    fakeApi({ [address]: apiError(503, 'unavailable') });
    show();
    expect(await screen.findByRole('alert')).toHaveTextContent('Booth use could not be worked out.');
  });

  it('is not for painters', () => {
    const { sent } = fakeApi({});
    show('/use', 'painter');
    expect(screen.getByText('Booth use is for owners and leads')).toBeVisible();
    expect(sent).toEqual([]);
  });
});

const noHours = { setup: 0, work: 0, spray: 0, flash: 0, purge: 0, bake: 0, cool: 0, held: 0 };

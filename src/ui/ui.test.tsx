import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { ApiError } from '#src/lib/api-error.ts';
import { formatsFor } from '#src/lib/formats.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { renderPage } from '#src/testing/render-page.tsx';
import { Button } from './button.tsx';
import { ConfirmDialog } from './dialog.tsx';
import { ErrorNote } from './error-note.tsx';
import { Menu, MenuItem } from './menu.tsx';
import { showToast } from './toast-store.ts';
import { TextField } from './text-field.tsx';
import { WindowGauge } from './window-gauge.tsx';

const formats = formatsFor({ zone: 'UTC', clock: '24', unit: 'C' }, () => Date.parse('2026-03-12T08:00:00Z'));

describe('a button', () => {
  it('takes no second press while it is busy, and keeps the focus', async () => {
    const press = vi.fn();
    const { rerender } = render(<Button onClick={press}>Post</Button>);
    const button = screen.getByRole('button', { name: 'Post' });
    await userEvent.click(button);
    rerender(
      <Button busy onClick={press}>
        Post
      </Button>,
    );
    await userEvent.click(button);
    expect(press).toHaveBeenCalledTimes(1);
    expect(button).toHaveFocus();
    expect(button).toHaveAttribute('aria-busy', 'true');
  });
  it('sends no form twice', async () => {
    const submit = vi.fn((event: { preventDefault: () => void }) => event.preventDefault());
    render(
      <form onSubmit={submit}>
        <Button type="submit" busy>
          Keep
        </Button>
      </form>,
    );
    await userEvent.click(screen.getByRole('button'));
    expect(submit).not.toHaveBeenCalled();
  });
});

describe('a field', () => {
  it('is read out with its hint and its error', async () => {
    render(<TextField label="Minutes" hint="Of flash." error="At least 5." />);
    expect(screen.getByLabelText('Minutes')).toHaveAccessibleDescription('Of flash. At least 5.');
    expect(screen.getByLabelText('Minutes')).toBeInvalid();
    await expectAccessible();
  });
});

describe('a question before what cannot be undone', () => {
  function Asking({ confirm }: { confirm: () => void }) {
    const [open, setOpen] = useState(false);
    return (
      <>
        <Button onClick={() => setOpen(true)}>Withdraw</Button>
        <ConfirmDialog
          open={open}
          onOpenChange={setOpen}
          title="Withdraw job 2418?"
          about="Its bookings fall free."
          deed="Withdraw job"
          onConfirm={confirm}
        />
      </>
    );
  }
  it('names the thing, closes with Esc and gives the focus back', async () => {
    const confirm = vi.fn();
    render(<Asking confirm={confirm} />);
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw' }));
    const dialog = screen.getByRole('dialog', { name: 'Withdraw job 2418?' });
    expect(dialog).toHaveAccessibleDescription('Its bookings fall free.');
    await expectAccessible(dialog);
    await userEvent.keyboard('{Escape}');
    expect(screen.queryByRole('dialog')).not.toBeInTheDocument();
    await waitFor(() => expect(screen.getByRole('button', { name: 'Withdraw' })).toHaveFocus());
    expect(confirm).not.toHaveBeenCalled();
  });
});

describe('a menu', () => {
  it('works by keys', async () => {
    const chosen = vi.fn<(what: string) => void>();
    render(
      <Menu trigger={<Button>More</Button>}>
        <MenuItem onSelect={() => chosen('pin')}>Pin</MenuItem>
        <MenuItem onSelect={() => chosen('split')}>Split off</MenuItem>
      </Menu>,
    );
    await userEvent.tab();
    await userEvent.keyboard('{Enter}{ArrowDown}{Enter}');
    expect(chosen).toHaveBeenCalledExactlyOnceWith('split');
  });
});

describe('a toast', () => {
  it('says what happened and can take it back', async () => {
    const undo = vi.fn();
    renderPage(<Button onClick={() => showToast('Stage moved', { act: { label: 'Undo', run: undo } })}>Move</Button>);
    await userEvent.click(screen.getByRole('button', { name: 'Move' }));
    await userEvent.click(await screen.findByRole('button', { name: 'Undo' }));
    expect(undo).toHaveBeenCalledOnce();
  });
});

describe('an error', () => {
  it('says what, why by which rule, what was kept and what next', () => {
    const reason = {
      code: 'place-closed',
      rule: 7,
      stageId: null,
      ids: ['b'],
      names: ['Booth 1'],
      at: ['2026-03-12T09:00:00Z', '2026-03-12T10:00:00Z'],
      minutes: [],
    };
    renderPage(
      <ErrorNote
        error={new ApiError('refused', { status: 422, reasons: [reason] })}
        what="The stage stays where it was."
      />,
    );
    const note = screen.getByRole('alert');
    expect(note).toHaveTextContent('The stage stays where it was. This breaks a rule, so nothing was changed.');
    // Berlin, as the shop in which the page is shown: one hour ahead of UTC in March.
    expect(note).toHaveTextContent(/Booth 1 is closed from .*10:00 to .*11:00. \(rule 7, closed times\)/);
  });
  it('does not pass a fault of the page off as one of the server', () => {
    render(<ErrorNote error={new TypeError('x is undefined')} />);
    expect(screen.getByRole('alert')).toHaveTextContent('fault of its own');
  });
});

describe('the window line', () => {
  const window = { earliest: '2026-03-12T09:00:00Z', latest: '2026-03-12T13:00:00Z' };
  it('says in words what it draws', () => {
    const { rerender } = render(<WindowGauge window={window} start="2026-03-12T09:15:00Z" formats={formats} />);
    expect(screen.getByRole('img')).toHaveAccessibleName('Window from 9:00 to 13:00, starts 9:15');
    rerender(<WindowGauge window={window} start="2026-03-12T14:00:00Z" formats={formats} />);
    expect(screen.getByRole('img')).toHaveAccessibleName(/outside its window$/);
  });
  it('is not drawn where nothing limits the start', () => {
    const { container } = render(
      <WindowGauge window={{ earliest: null, latest: null }} start="2026-03-12T14:00:00Z" formats={formats} />,
    );
    expect(container).toBeEmptyDOMElement();
  });
});

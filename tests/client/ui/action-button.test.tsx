import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { ActionButton } from '../../../src/ui/action-button';

const button = () => screen.getByRole('button', { name: 'Approve' });

describe('ActionButton', () => {
  it('acts where it may', async () => {
    const press = vi.fn();
    render(
      <ActionButton whyNot={null} onPress={press}>
        Approve
      </ActionButton>,
    );
    await userEvent.click(button());
    expect(press).toHaveBeenCalledTimes(1);
    expect(button().getAttribute('aria-disabled')).toBeNull();
  });

  it('stays visible and focusable where it may not, says why, and does nothing', async () => {
    const press = vi.fn();
    render(
      <form onSubmit={press}>
        <ActionButton whyNot="You wrote this revision." onPress={press} type="submit">
          Approve
        </ActionButton>
      </form>,
    );
    await userEvent.tab();
    expect(document.activeElement).toBe(button());
    expect(button().getAttribute('aria-disabled')).toBe('true');
    expect(document.getElementById(button().getAttribute('aria-describedby') ?? '')?.textContent).toBe(
      'You wrote this revision.',
    );
    await userEvent.keyboard('{Enter}');
    await userEvent.click(button());
    expect(press).not.toHaveBeenCalled();
  });

  it('shows the reason in a tooltip that the keyboard reaches', async () => {
    render(
      <ActionButton whyNot="You wrote this revision." reason="tooltip">
        Approve
      </ActionButton>,
    );
    await userEvent.tab();
    expect((await screen.findByRole('tooltip')).textContent).toBe('You wrote this revision.');
  });
});

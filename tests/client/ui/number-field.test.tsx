import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it } from 'vitest';
import { NumberField } from '../../../src/ui/number-field';

function Turns() {
  const [turns, setTurns] = useState<number | null>(1000);
  return (
    <>
      <NumberField label="Turns" whole least={1} most={100_000} value={turns} onChange={setTurns} />
      <output>{String(turns)}</output>
      <button type="button" onClick={() => setTurns(250)}>
        reset
      </button>
    </>
  );
}

describe('NumberField', () => {
  it('keeps a text that is no number, and hands on none', async () => {
    render(<Turns />);
    const box = screen.getByRole<HTMLInputElement>('textbox', { name: 'Turns' });
    await userEvent.clear(box);
    await userEvent.type(box, '12.5');
    expect(box.value).toBe('12.5');
    expect(screen.getByRole('status').textContent).toBe('null');
    expect(screen.getByText(/12.5 is not a whole number/)).toBeTruthy();
  });

  it('follows a change from outside', async () => {
    render(<Turns />);
    await userEvent.click(screen.getByRole('button', { name: 'reset' }));
    expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Turns' }).value).toBe('250');
  });
});

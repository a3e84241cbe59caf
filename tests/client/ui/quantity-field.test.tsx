import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { QuantityField } from '../../../src/ui/quantity-field';
import type { QuantityFieldProps } from '../../../src/ui/quantity-field';

function Diameter({ initial = '', ...rest }: Partial<QuantityFieldProps> & { initial?: string }) {
  const [text, setText] = useState(initial);
  return (
    <>
      <QuantityField
        label="Outer diameter"
        dimension="length"
        unit="mm"
        least={1e-4}
        most={0.2}
        {...rest}
        value={text}
        onChange={setText}
      />
      <button type="button">next</button>
    </>
  );
}

const box = () => screen.getByRole<HTMLInputElement>('textbox', { name: /Outer diameter/ });
const described = () =>
  (box().getAttribute('aria-describedby') ?? '')
    .split(' ')
    .map((id) => document.getElementById(id)?.textContent)
    .join(' | ');

describe('QuantityField', () => {
  it('shows what it understood and hands on the SI value', async () => {
    const understood = vi.fn();
    render(<Diameter onUnderstood={understood} />);
    await userEvent.type(box(), '0.47 in');
    expect(described()).toBe('= 11.9 mm = 0.0119 m');
    expect(understood).toHaveBeenLastCalledWith(0.011938);
  });

  it('leaves the text as it was typed', async () => {
    render(<Diameter />);
    await userEvent.type(box(), ' 12.50e0mm');
    await userEvent.tab();
    expect(box().value).toBe(' 12.50e0mm');
  });

  it('takes the field’s unit where none is typed', async () => {
    const understood = vi.fn();
    render(<Diameter onUnderstood={understood} />);
    await userEvent.type(box(), '12');
    expect(understood).toHaveBeenLastCalledWith(0.012);
    expect(described()).toBe('= 0.0120 m');
  });

  it('works out arithmetic', async () => {
    const understood = vi.fn();
    render(<Diameter onUnderstood={understood} />);
    await userEvent.type(box(), '24mm/2');
    // The calculator is fetched on the first sum: a large module for a test run.
    expect(await screen.findByText('= 12.0 mm = 0.0120 m', {}, { timeout: 20_000 })).toBeTruthy();
    await waitFor(() => expect(understood).toHaveBeenLastCalledWith(0.012));
  });

  it('does not call a half-typed text wrong, but says what is wrong once the field is left', async () => {
    render(<Diameter />);
    await userEvent.type(box(), '12 m/');
    expect(box().getAttribute('aria-invalid')).toBeNull();
    await userEvent.tab();
    expect(box().getAttribute('aria-invalid')).toBe('true');
    expect(described()).toMatch(/Outer diameter: .*12 m\//);
    expect(box().value).toBe('12 m/');
  });

  it('names field, value and limit, and hands on nothing beyond the limit', async () => {
    const understood = vi.fn();
    render(<Diameter onUnderstood={understood} />);
    await userEvent.type(box(), '300');
    expect(described()).toContain('Outer diameter: 300.0 mm is above the limit of 200.0 mm.');
    expect(understood).toHaveBeenLastCalledWith(null);
  });

  it('says which value holds where it is left empty, and what the server found wrong', () => {
    render(<Diameter source="default 10 mm" error="The magnet does not fit the bore." />);
    expect(described()).toContain('default 10 mm');
    expect(described()).toContain('The magnet does not fit the bore.');
    expect(box().getAttribute('aria-invalid')).toBe('true');
  });

  it('does not repeat a plain figure on a dense sheet', () => {
    render(<Diameter layout="inline" initial="10" />);
    expect(box().getAttribute('aria-describedby')).toBeNull();
    expect(screen.getByText('mm')).toBeTruthy();
  });
});

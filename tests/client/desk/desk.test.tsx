import { screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Desk } from '#contracts/desk';
import { DeskSheet } from '../../../src/features/desk/desk-sheet';
import { drawn } from '../../support/client-drawn';
import { people } from '../../support/client-samples';

const at = '2026-03-14T09:32:00.000Z';
const desk = Desk.parse({
  waitsForMe: [
    { href: '/designs/x/B', title: 'FN-014 B · Pump-side node', what: 'Review it: you are a reviewer.', since: at },
  ],
  iWaitFor: [],
  recent: [
    { at, by: people.designer, sentence: 'Ilse Varga submitted FN-014 B.', href: '/designs/x/B', title: 'FN-014 B' },
  ],
});

describe('the desk', () => {
  it('says what waits, why it is mine, and leads there', () => {
    drawn(<DeskSheet desk={desk} firstSteps={null} />);
    const link = screen.getByRole('link', { name: /FN-014 B · Pump-side node/ });
    expect(link.getAttribute('href')).toBe('/designs/x/B');
    expect(link.textContent).toContain('Review it: you are a reviewer.');
    const lately = screen.getByRole('heading', { name: 'Lately' }).closest('section');
    expect(lately && within(lately).getByText(/submitted FN-014 B/)).toBeTruthy();
  });

  it('offers a first step when nothing waits', () => {
    drawn(
      <DeskSheet
        desk={{ waitsForMe: [], iWaitFor: [], recent: [] }}
        firstSteps={<a href="/briefs">Look at the briefs</a>}
      />,
    );
    expect(screen.getByText('Nothing waits for you.')).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Look at the briefs' })).toBeTruthy();
    expect(screen.getByText('Nothing of yours is with somebody else.')).toBeTruthy();
  });
});

import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { SignInForm } from '../../../src/features/session/sign-in-form';
import { SignInAgain } from '../../../src/features/session/sign-in-again';
import { fetchJson, forgetCsrfToken } from '../../../src/lib/fetch-json';
import { clientApi } from '../../support/client-api';
import { drawn } from '../../support/client-drawn';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import { z } from 'zod';
import type { Me } from '#contracts/session';

const me: Me = {
  id: '0b8f8f0e-55a5-4d0c-9d3e-0d3f0a6f1c11',
  name: 'Ilse Varga',
  email: 'ilse.varga@fennmark.example',
  roles: ['designer'],
  mayEnter: ['desk'],
};

const fill = async () => {
  await userEvent.type(screen.getByRole('textbox', { name: 'E-mail address' }), me.email);
  await userEvent.type(screen.getByLabelText('Password'), 'a long password{Enter}');
};

describe('signing in', () => {
  beforeEach(() => forgetCsrfToken());

  it('hands on the session', async () => {
    const signedIn = vi.fn();
    vi.stubGlobal('fetch', clientApi({ signIn: () => ({ body: { me, csrfToken: 'new' } }) }).fetch);
    drawn(<SignInForm onSignedIn={signedIn} />);
    await fill();
    expect(signedIn).toHaveBeenCalledWith({ me, csrfToken: 'new' });
  });

  it('asks for what is missing before sending anything', async () => {
    vi.stubGlobal('fetch', clientApi({}).fetch);
    drawn(<SignInForm onSignedIn={vi.fn()} />);
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(screen.getByText('Give your e-mail address.')).toBeTruthy();
    expect(screen.getByText('Give your password.')).toBeTruthy();
  });

  it('says at the field that it was refused, and keeps what was typed', async () => {
    vi.stubGlobal(
      'fetch',
      clientApi({ signIn: () => ({ code: 'unauthenticated', message: 'Address or password is not right.' }) }).fetch,
    );
    drawn(<SignInForm onSignedIn={vi.fn()} />);
    await fill();
    expect(await screen.findByText('Address or password is not right.')).toBeTruthy();
    expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'E-mail address' }).value).toBe(me.email);
    expect(screen.getByLabelText('Password').getAttribute('aria-invalid')).toBe('true');
  });

  it('tells of too many attempts', async () => {
    vi.stubGlobal('fetch', clientApi({ signIn: () => ({ code: 'tooMany', message: 'Too many attempts.' }) }).fetch);
    drawn(<SignInForm onSignedIn={vi.fn()} />);
    await fill();
    expect((await screen.findByRole('alert')).textContent).toContain('Too many attempts. Wait a few minutes');
  });

  it('asks again over the page when the session has ended, and keeps the page', async () => {
    const api = clientApi({
      readDesk: () => ({ code: 'unauthenticated', message: 'Sign in.' }),
      signIn: () => ({ body: { me, csrfToken: 'new' } }),
    });
    vi.stubGlobal('fetch', api.fetch);
    const router = createMemoryRouter([
      {
        path: '/',
        element: (
          <>
            <input aria-label="Remark" defaultValue="half a sentence" />
            <SignInAgain me={me} />
          </>
        ),
      },
    ]);
    render(
      <QueryClientProvider client={new QueryClient()}>
        <RouterProvider router={router} />
      </QueryClientProvider>,
    );
    await fetchJson(z.unknown(), '/desk').catch(() => undefined);
    expect(await screen.findByRole('alertdialog', { name: 'Your session has ended' })).toBeTruthy();
    await userEvent.type(screen.getByLabelText('Password'), 'a long password{Enter}');
    expect(api.bodies('signIn')).toEqual([{ email: me.email, password: 'a long password' }]);
    await vi.waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Remark' }).value).toBe('half a sentence');
  });
});

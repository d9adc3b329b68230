import { problem } from '@steepfall/shared/problems';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { SignInForm } from './sign-in-form.tsx';

function hubAnswers(respond: () => Response | Promise<Response>) {
  const sent = vi.fn(async (_input: RequestInfo | URL, _init?: RequestInit) => respond());
  vi.stubGlobal('fetch', sent);
  return sent;
}

const field = (name: string) => screen.getByLabelText<HTMLInputElement>(name);
const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

describe(SignInForm, () => {
  afterEach(() => {
    vi.unstubAllGlobals();
  });

  it('says at each field what is missing, and asks the hub nothing', async () => {
    const sent = hubAnswers(() => new Response('{}'));
    render(<SignInForm />);
    await userEvent.type(field('E-mail'), 'brewer at wrenfold');
    await press('Sign in');
    expect(await screen.findByText('This is not an e-mail address.')).toBeTruthy();
    expect(screen.getByText('Type your password.')).toBeTruthy();
    expect(field('E-mail').getAttribute('aria-invalid')).toBe('true');
    expect(sent).not.toHaveBeenCalled();
  });

  it('puts a wrong password at the password, marked for the next try', async () => {
    hubAnswers(() => new Response(JSON.stringify(problem('wrong-credentials', 'No.')), { status: 401 }));
    render(<SignInForm />);
    await userEvent.type(field('E-mail'), 'brewer@wrenfold.example');
    await userEvent.type(field('Password'), 'not this one');
    await press('Sign in');
    expect(await screen.findByText('E-mail or password is wrong. Check both, then try again.')).toBeTruthy();
    expect(document.activeElement).toBe(field('Password'));
  });

  it('tells a hub that does not answer from a wrong password', async () => {
    hubAnswers(() => Promise.reject(new TypeError('Failed to fetch')));
    render(<SignInForm />);
    await userEvent.type(field('E-mail'), 'brewer@wrenfold.example');
    await userEvent.type(field('Password'), 'long enough now');
    await press('Sign in');
    expect((await screen.findByRole('alert')).textContent).toContain('The hub does not answer.');
  });

  it('shows the password on request', async () => {
    render(<SignInForm />);
    expect(field('Password').type).toBe('password');
    await press('Show the password');
    expect(field('Password').type).toBe('text');
    expect(screen.getByRole('button', { name: 'Show the password' }).getAttribute('aria-pressed')).toBe('true');
  });
});

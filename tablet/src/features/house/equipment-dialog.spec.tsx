import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { signIn, signOut } from '#lib/session.ts';
import { EquipmentDialog } from './equipment-dialog.tsx';

const id = (last: number) => `0190a0b0-0000-7000-8000-00000000000${last}`;
let sent: { url: string; body: unknown }[];

/** A brewer who reads gallons, in front of a hub that takes everything. */
beforeEach(async () => {
  sent = [];
  const member = {
    id: id(1),
    displayName: 'Brewer',
    email: 'brewer@house.example',
    role: 'brewer',
    isActive: true,
    units: { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' },
  };
  const house = { id: id(2), name: 'House', altitudeM: 0, currency: 'EUR', version: 1 };
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
  vi.stubGlobal('fetch', (url: string, { body }: { body: string | null }) => {
    const asked = JSON.parse(body ?? 'null') as object;
    sent.push({ url, body: asked });
    return Promise.resolve(
      Response.json(
        url.endsWith('sign-in')
          ? { accessToken: 'a', expiresAtMs: 1, member, house }
          : { id: id(3), ...asked, version: 1 },
      ),
    );
  });
  await act(() => signIn({ email: member.email, password: 'a password' }));
  sent = [];
});
afterEach(async () => {
  await act(() => signOut());
  vi.unstubAllGlobals();
});

const open = (onClose = vi.fn()) => {
  render(
    <QueryClientProvider client={new QueryClient()}>
      <EquipmentDialog item={null} onClose={onClose} />
    </QueryClientProvider>,
  );
  return onClose;
};
const fill = async (label: string, text: string) => {
  await userEvent.clear(screen.getByLabelText(label));
  if (text) await userEvent.type(screen.getByLabelText(label), text);
};
const textOf = (label: string) => (screen.getByLabelText(label) as HTMLInputElement).value;

describe('a new kettle', () => {
  it('is typed in gallons and kept in litres; the heat proposes what reaches the water', async () => {
    const onClose = open();
    await fill('Name', 'Tall kettle');
    await fill('Volume to the brim', '5');
    await userEvent.selectOptions(screen.getByLabelText('What heats it'), 'gas hob');
    expect(textOf('Share that reaches the water')).toBe('42');
    await fill('Halfway to the room in', '120');
    await fill('Mass when empty', '');
    await userEvent.click(screen.getByRole('button', { name: 'Add' }));
    expect((await screen.findByRole('alert')).textContent).toBe('Type a number.');
    await fill('Mass when empty', '8');
    await userEvent.click(screen.getByRole('button', { name: 'Add' }));
    await vi.waitFor(() => expect(onClose).toHaveBeenCalled());
    expect(sent[0]).toEqual({
      url: '/api/equipment',
      body: {
        kind: 'kettle',
        name: 'Tall kettle',
        facts: expect.objectContaining({
          volumeL: expect.closeTo(18.927, 3),
          heatSource: 'gasHob',
          heaterEfficiency: 0.42,
          coolingConstantPerS: expect.closeTo(Math.LN2 / 7200, 9),
        }),
      },
    });
  });

  it('says at the field what does not fit, in gallons, and loses nothing', async () => {
    open();
    await fill('Name', 'Kettle');
    await fill('Volume to the brim', '1e9');
    await fill('Width inside', 'wide');
    await userEvent.click(screen.getByRole('button', { name: 'Add' }));
    const alerts = (await screen.findAllByRole('alert')).map(({ textContent }) => textContent);
    expect(alerts.map((text) => text?.replaceAll('\u00a0', ' '))).toEqual(['At most 264.2 gal.', 'Type a number.']);
    expect([textOf('Volume to the brim'), textOf('Width inside')]).toEqual(['1e9', 'wide']);
    expect(sent).toEqual([]);
  });
});

import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { LogBuilder, MEMBER_ID } from '@steepfall/shared/testing';
import { foldRun } from '@steepfall/shared/runs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { signIn, signOut } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { MeasureSheet } from './measure-sheet.tsx';
import { conditionText } from './sheet-words.ts';

const HOUSE_ID = '0190a0b0-0000-7000-8000-000000000001';
const plain = (text: string | null) => text?.replaceAll('\u00a0', ' ');

/** The hub lets in a hand who reads and types °F, oz, gal and psi. */
beforeEach(async () => {
  const member = {
    id: MEMBER_ID,
    displayName: 'Hand',
    email: 'hand@house.example',
    role: 'hand',
    isActive: true,
    units: { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' },
  };
  const house = { id: HOUSE_ID, name: 'House', altitudeM: 0, currency: 'EUR', version: 1 };
  const session = { accessToken: 'a', expiresAtMs: 1, member, house };
  vi.stubGlobal('fetch', () => Promise.resolve(Response.json(session)));
  await act(() => signIn({ email: member.email, password: 'a password' }));
});
afterEach(async () => {
  await act(() => signOut());
  vi.unstubAllGlobals();
});

function Conditions() {
  const units = useUnits();
  const { steps } = foldRun(new LogBuilder().entries);
  return <p>{steps.map(({ step }) => conditionText(step, units)).join(' | ')}</p>;
}

describe('a hand who reads °F', () => {
  it('sees 143.6 °F where the sheet waits for 62 °C', () => {
    render(<Conditions />);
    expect(plain(screen.getByText(/falling/).textContent)).toContain('at 143.6 °F, falling');
  });

  it('types 140 °F, and 60 °C are kept', async () => {
    const onRecord = vi.fn(() => Promise.resolve({ ok: true as const, events: [] }));
    render(
      <MeasureSheet
        quantity="tempC"
        stepId={null}
        done={{ by: 'measurement', quantity: 'tempC', min: 55, max: 65 }}
        tempC={() => null}
        onRecord={onRecord}
        onClose={() => undefined}
      />,
    );
    expect(screen.getByRole('status').textContent).toContain('Wanted: 131 to 149.');
    await userEvent.type(screen.getByRole('textbox', { name: 'temperature °F' }), '140');
    await userEvent.click(screen.getByRole('button', { name: 'Keep it' }));
    expect(onRecord).toHaveBeenCalledWith(expect.objectContaining({ quantity: 'tempC', value: 60 }));
  });
});

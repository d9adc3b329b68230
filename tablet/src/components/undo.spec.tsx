import { act, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { offerUndo, undoable } from '#lib/undo.ts';
import { UndoStrip } from './undo.tsx';

afterEach(() => act(() => undoable.set(null)));

describe('what was just done', () => {
  it('is told politely and can be taken back', async () => {
    let isBack = false;
    render(<UndoStrip />);
    const region = screen.getByRole('status');
    act(() =>
      offerUndo('Keg B removed.', () => {
        isBack = true;
        return Promise.resolve();
      }),
    );
    expect(region.textContent).toContain('Keg B removed.');
    await act(async () => fireEvent.click(screen.getByRole('button', { name: 'Undo' })));
    expect(isBack).toBe(true);
    expect(region.textContent).toBe('');
  });

  it('says so when it could not be, and lets the person try again', async () => {
    render(<UndoStrip />);
    act(() => offerUndo('Keg B removed.', () => Promise.reject(new Error('no'))));
    await act(async () => fireEvent.click(screen.getByRole('button', { name: 'Undo' })));
    expect(screen.getByRole('status').textContent).toContain('Not taken back.');
    expect(screen.getByRole('button', { name: 'Try again' })).toBeTruthy();
  });
});

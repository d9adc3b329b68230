import { fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { expect, it, vi } from 'vitest';
import { PressButton } from './press-button.tsx';

/** jsdom knows no pointer events: a mouse event with what they carry. */
function touch(target: Element, type: 'pointerdown' | 'pointerup', pointerId: number, isPrimary = true): void {
  const event = new MouseEvent(type, { bubbles: true, cancelable: true });
  fireEvent(target, Object.assign(event, { pointerType: 'touch', pointerId, isPrimary }));
}

const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

async function press(element: Element, pointerId: number): Promise<void> {
  touch(element, 'pointerdown', pointerId);
  await wait(100);
  touch(element, 'pointerup', pointerId);
}

it('does not count a finger that was lifted where nobody saw it', async () => {
  const onPress = vi.fn();
  render(<PressButton onPress={onPress}>Done</PressButton>);
  touch(screen.getByRole('button'), 'pointerdown', 5);
  await press(screen.getByRole('button'), 6);
  expect(onPress).toHaveBeenCalledOnce();
});

it('spoils a press when a second finger comes down beside it', async () => {
  const onPress = vi.fn();
  render(<PressButton onPress={onPress}>Done</PressButton>);
  touch(screen.getByRole('button'), 'pointerdown', 7);
  touch(document.body, 'pointerdown', 8, false);
  await wait(100);
  touch(screen.getByRole('button'), 'pointerup', 7);
  touch(document.body, 'pointerup', 8, false);
  expect(onPress).not.toHaveBeenCalled();
});

function Swap({ onSecond }: { onSecond: () => void }) {
  const [isSwapped, setIsSwapped] = useState(false);
  return isSwapped ? (
    <button onClick={onSecond}>Second</button>
  ) : (
    <PressButton onPress={() => setIsSwapped(true)}>First</PressButton>
  );
}

it('keeps the click after a touch from what came under the finger meanwhile', async () => {
  const onSecond = vi.fn();
  render(<Swap onSecond={onSecond} />);
  await press(screen.getByRole('button', { name: 'First' }), 9);
  const second = screen.getByRole('button', { name: 'Second' });
  fireEvent.click(second, { detail: 1 });
  expect(onSecond).not.toHaveBeenCalled();
  touch(second, 'pointerdown', 10);
  touch(second, 'pointerup', 10);
  fireEvent.click(second, { detail: 1 });
  expect(onSecond).toHaveBeenCalledOnce();
});

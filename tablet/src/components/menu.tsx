import { Menu as HeadlessMenu, MenuButton, MenuItem, MenuItems } from '@headlessui/react';
import type { ReactNode } from 'react';
import { buttonClass, type ButtonLook } from './button.tsx';

export interface MenuChoice {
  label: string;
  onChoose: () => void;
  isDisabled?: boolean;
  isDanger?: boolean;
}

/** A short list of acts behind one button. */
export function Menu({
  label,
  choices,
  look = 'quiet',
}: {
  label: ReactNode;
  choices: MenuChoice[];
  look?: ButtonLook;
}) {
  return (
    <HeadlessMenu>
      <MenuButton className={buttonClass(look)}>{label}</MenuButton>
      <MenuItems
        // Not modal: what stands around a short list stays readable.
        modal={false}
        anchor={{ to: 'bottom end', gap: 6 }}
        className="z-50 min-w-56 rounded-lg border-2 border-text bg-raised p-1.5 text-text focus:outline-none"
      >
        {choices.map(({ label: text, onChoose, isDisabled, isDanger }) => (
          <MenuItem key={text} disabled={isDisabled ?? false}>
            <button
              type="button"
              onClick={onChoose}
              className={`flex min-h-12 w-full cursor-pointer items-center rounded px-4 text-left text-body data-disabled:opacity-50 data-focus:bg-text data-focus:text-ground ${isDanger ? 'text-ember' : ''}`}
            >
              {text}
            </button>
          </MenuItem>
        ))}
      </MenuItems>
    </HeadlessMenu>
  );
}

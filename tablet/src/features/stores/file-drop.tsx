import { useRef, useState } from 'react';
import { Button } from '#components/button.tsx';
import { classNames } from '#components/class-names.ts';

interface FileDropProps {
  label: string;
  isBusy: boolean;
  onFile: (file: File) => void;
}

/** A file, chosen or dropped. */
export function FileDrop({ label, isBusy, onFile }: FileDropProps) {
  const input = useRef<HTMLInputElement>(null);
  const [isOver, setIsOver] = useState(false);
  return (
    // A drop is a shortcut for those with a mouse; the button in it does the same for everybody.
    // eslint-disable-next-line jsx-a11y/no-static-element-interactions
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setIsOver(true);
      }}
      onDragLeave={() => setIsOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setIsOver(false);
        const [file] = event.dataTransfer.files;
        if (file) onFile(file);
      }}
      className={classNames(
        'flex flex-wrap items-center gap-x-6 gap-y-3 border-2 border-dashed px-6 py-7',
        isOver ? 'border-text bg-raised' : 'border-hair',
      )}
    >
      <Button look="primary" isBusy={isBusy} busyLabel="Reading it" onClick={() => input.current?.click()}>
        Choose a file
      </Button>
      <p className="min-w-0 flex-1 basis-60 text-body text-soft break-words">{label}, or drop it here.</p>
      <input
        ref={input}
        type="file"
        accept=".csv,text/csv,text/plain"
        aria-label="List of the stores, as CSV"
        tabIndex={-1}
        className="sr-only"
        onChange={({ target }) => {
          const [file] = target.files ?? [];
          if (file) onFile(file);
          // The same file, mended, can be chosen again.
          target.value = '';
        }}
      />
    </div>
  );
}

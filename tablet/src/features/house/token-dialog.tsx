import { useState } from 'react';
import type { ProbeWithToken } from '@steepfall/shared/contracts';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';

function curlFor(deviceToken: string): string {
  return [
    `curl -X POST ${location.origin}/api/device/readings \\`,
    `  -H 'Authorization: Bearer ${deviceToken}' \\`,
    `  -H 'Content-Type: application/json' \\`,
    `  -d '{ "readings": [{ "atMs": '"$(date +%s%3N)"', "tempC": 71.4 }] }'`,
  ].join('\n');
}

/** The token, shown this once: the hub keeps only a hash of it. */
export function TokenDialog({ made: { probe, deviceToken }, onClose }: { made: ProbeWithToken; onClose: () => void }) {
  return (
    <Dialog
      isOpen
      // A stray touch outside must not take away what is shown only once.
      onClose={() => undefined}
      size="wide"
      title={`The token of ${probe.name}`}
      actions={
        <Button look="primary" onClick={onClose}>
          I have it
        </Button>
      }
    >
      <p className="font-medium">
        It is shown this once. The hub keeps no copy that can be read; if it is lost, make a new one.
      </p>
      <Copyable label="Device token" text={deviceToken} />
      <p className="mt-7">Send a reading with it, from any machine on this network:</p>
      <Copyable label="Example" text={curlFor(deviceToken)} />
    </Dialog>
  );
}

function Copyable({ label, text }: { label: string; text: string }) {
  const [state, setState] = useState<'idle' | 'copied' | 'failed'>('idle');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setState('copied');
    } catch {
      // Plain HTTP has no clipboard.
      setState('failed');
    }
  };
  return (
    <div className="mt-3 grid gap-2">
      <pre
        // A long line is scrolled sideways: the keyboard must get to it.
        // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
        tabIndex={0}
        aria-label={label}
        className="overflow-x-auto whitespace-pre-wrap break-all border-2 border-edge bg-sunken p-4 font-[ui-monospace,monospace] text-note select-all"
      >
        {text}
      </pre>
      <div className="flex items-center gap-4">
        <Button onClick={() => void copy()}>Copy</Button>
        <p role="status" className="text-note text-soft">
          {state === 'copied'
            ? 'Copied.'
            : state === 'failed'
              ? 'This browser does not copy here: mark the text and copy it by hand.'
              : ''}
        </p>
      </div>
    </div>
  );
}

const KEYS = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '.', '0', '⌫'] as const;
const LONGEST = 7;

/** What a key makes of the typed text. Pure, for its spec. */
export function typed(text: string, key: string): string {
  if (key === '⌫') return text.slice(0, -1);
  if (key === '.') return text.includes('.') ? text : `${text === '' ? '0' : text}.`;
  if (text === '0') return key;
  return text.length >= LONGEST ? text : text + key;
}

/** Keys for a wet finger. The hardware keyboard types into the field beside it. */
export function NumberPad({ onKey }: { onKey: (key: string) => void }) {
  return (
    <div className="number-pad" role="group" aria-label="Number pad">
      {KEYS.map((key) => (
        <button
          key={key}
          type="button"
          onClick={() => onKey(key)}
          aria-label={key === '⌫' ? 'Delete the last digit' : key === '.' ? 'Point' : key}
        >
          {key}
        </button>
      ))}
    </div>
  );
}

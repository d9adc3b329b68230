import { useMemo } from 'react';
import qrcode from 'qrcode-generator';

/** Light modules around the code, without which cameras do not find it (ISO/IEC 18004). */
const QUIET = 4;

/** A code for a camera: dark on light on either ground, as drawing, so that it is sharp at every size. */
export function QrCode({ text, label }: { text: string; label: string }) {
  const { path, size } = useMemo(() => drawn(text), [text]);
  return (
    <svg
      viewBox={`0 0 ${size} ${size}`}
      role="img"
      aria-label={label}
      shapeRendering="crispEdges"
      className="aspect-square w-full max-w-80"
    >
      <path d={`M0 0h${size}v${size}H0z`} fill="#ffffff" />
      <path d={path} fill="#12201c" />
    </svg>
  );
}

function drawn(text: string): { path: string; size: number } {
  // The version follows from the length; "M" mends what a drop of water covers.
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const count = code.getModuleCount();
  const rows = Array.from({ length: count }, (_, row) =>
    Array.from({ length: count }, (_unused, column) =>
      code.isDark(row, column) ? `M${column + QUIET} ${row + QUIET}h1v1h-1z` : '',
    ).join(''),
  );
  return { path: rows.join(''), size: count + 2 * QUIET };
}

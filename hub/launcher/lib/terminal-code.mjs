import qrcode from 'qrcode-generator';

/** Cameras need a light border around the code; four modules are asked for (ISO/IEC 18004). */
const BORDER = 4;

/**
 * A code to be scanned from the terminal: two rows of modules a line. Dark on light by colours of its own, since a camera may not take a
 * code whose light and dark are swapped.
 * @param {string} text
 */
export function terminalCode(text) {
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const size = code.getModuleCount();
  /** @param {number} row @param {number} column */
  const isDark = (row, column) => row >= 0 && column >= 0 && row < size && column < size && code.isDark(row, column);
  const lines = [];
  for (let row = -BORDER; row < size + BORDER; row += 2) {
    let line = '';
    for (let column = -BORDER; column < size + BORDER; column += 1) {
      const [upper, lower] = [isDark(row, column), isDark(row + 1, column)];
      line += upper ? (lower ? '█' : '▀') : lower ? '▄' : ' ';
    }
    lines.push(`\x1b[30;107m${line}\x1b[0m`);
  }
  return lines.join('\n');
}

/**
 * How to bring a tablet to a hub that serves the network of the house.
 * @param {import('./hub.mjs').LanFacts} lan
 * @param {number} port
 * @param {string} folder of the certificates
 */
export async function lanWords({ origins, guides, sha256, sha1, isNewAuthority, outside }, port, folder) {
  const [guide] = guides;
  const lines = [
    `Steepfall is ready: ${[...origins, `https://localhost:${port}`].join('\n                    ')}`,
    '',
    guide
      ? `A tablet that is new here opens this first; it says how to trust the hub: ${guides.join(' or ')}`
      : 'This machine is in no network; once it is, start again to see its address.',
    'Fingerprint of the certificate, to compare on the tablet:',
    ...inLines('SHA-256', sha256),
    ...inLines('SHA-1', sha1),
  ];
  if (isNewAuthority)
    lines.push(
      '',
      `The certificate authority is new: every tablet, and this machine, has to trust it once. Its key stays in ${folder}.`,
    );
  if (outside.length > 0)
    lines.push(
      '',
      `The certificate cannot name ${outside.join(', ')}, since the authority was made elsewhere. Use another address above, or move ${folder} away and let every tablet trust the new authority.`,
    );
  if (guide && process.stdout.isTTY) {
    // Only here, after the packages are there.
    const { terminalCode } = await import('./terminal-code.mjs');
    lines.push('', terminalCode(guide));
  }
  return lines.join('\n');
}

/**
 * Eight pairs a piece: so it is compared by eye.
 * @param {string} name
 * @param {string} fingerprint
 */
function inLines(name, fingerprint) {
  const pairs = fingerprint.split(':');
  const lines = [];
  for (let start = 0; start < pairs.length; start += 16) {
    const pieces = [pairs.slice(start, start + 8), pairs.slice(start + 8, start + 16)].map((piece) => piece.join(' '));
    lines.push(`  ${(start === 0 ? name : '').padEnd(9)}${pieces.join('   ')}`.trimEnd());
  }
  return lines;
}

import { devices, type Device } from './guide-words.js';
import type { Trust } from './trust-folder.js';

export interface GuideFacts {
  trust: Trust;
  /** As the request names it: where this device already reaches the hub. */
  host: string;
  httpsPort: number;
  checkPath: string;
}

/** The page about trusting, whole and readable without its script: that one only opens the right device and asks whether it is done. */
export function guidePage({ trust, host, httpsPort, checkPath }: GuideFacts): string {
  const origin = `https://${knownHost(trust, host)}:${httpsPort}`;
  const { sha256, sha1, endsAtMs } = trust.authority;
  const lastDay = new Date(endsAtMs).toISOString().slice(0, 10);
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Steepfall: trust this hub</title>
<link rel="icon" href="/mark.svg">
<link rel="stylesheet" href="/guide.css">
<script src="/guide.js" defer></script>
</head>
<body data-check="${escape(origin + checkPath)}">
<main>
<p class="wordmark"><img src="/mark.svg" alt="" width="32" height="32"> steepfall</p>
<h1>Let this device trust the hub</h1>
<p class="lead">Browsers keep the screen awake, work without the network and send notifications only where they trust the other end. This takes
about two minutes, once for each device.</p>
<section class="state" aria-labelledby="state" data-state="unknown">
<div role="status">
<h2 id="state">Is it trusted already?</h2>
<p class="state-words">Open <a href="${escape(origin)}">${escape(origin)}</a>: when the browser warns, it is not.</p>
</div>
<p class="state-actions"><a class="button" id="open" href="${escape(origin)}" hidden>Open Steepfall</a>
<button class="button quiet" id="again" type="button" hidden>Look again</button></p>
</section>
<h2>Which device is this?</h2>
${devices.map(deviceSection).join('\n')}
<h2 id="compare">The fingerprint</h2>
<p>This page came without protection, so make sure that the certificate is the hub’s. The window in which Steepfall was started prints the same
fingerprint; compare it group by group. <strong>If they differ, do not install it.</strong></p>
<dl>
<div><dt>SHA-256</dt><dd class="print">${groups(sha256)}</dd></div>
<div><dt>SHA-1, which Windows calls thumbprint</dt><dd class="print">${groups(sha1)}</dd></div>
</dl>
<h2>What it means</h2>
<p>The certificate lets this device recognise one machine: the one that made it. The key behind it never leaves that machine. It is written for
names that end in “.local” and for addresses of networks like this one, and most devices hold it to that. It is good until ${lastDay}. When the
machine is given away, or the kitchen is, remove the certificate from each device: how is the last point of its steps.</p>
</main>
</body>
</html>
`;
}

function deviceSection({ id, name, steps, remove }: Device): string {
  return `<details name="device" id="${id}">
<summary>${name}</summary>
<ol>
${steps.map((step) => `<li>${step}</li>`).join('\n')}
</ol>
<p class="remove"><strong>To remove it again:</strong> ${remove}</p>
</details>`;
}

/** The host of the request when the certificate names it, otherwise one that it names. */
function knownHost({ names: { names, addresses } }: Trust, host: string): string {
  const asked = host.toLowerCase().replace(/:\d+$/, '');
  if ([...names, ...addresses].includes(asked)) return asked;
  return addresses[0] ?? names[0] ?? 'localhost';
}

/** Four pairs of digits at a time: so they are read aloud. */
function groups(fingerprint: string): string {
  const pairs = fingerprint.split(':');
  const starts = pairs.map((_, index) => index).filter((index) => index % 4 === 0);
  return starts.map((start) => `<span>${pairs.slice(start, start + 4).join(' ')}</span>`).join(' ');
}

function escape(text: string): string {
  return text.replace(/[&<>"']/g, (letter) => `&#${letter.charCodeAt(0)};`);
}

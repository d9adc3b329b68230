export interface Device {
  id: string;
  name: string;
  /** HTML of ours. */
  steps: readonly string[];
  remove: string;
}

const compare = 'Compare the <a href="#compare">fingerprint</a> with the one on the hub’s machine.';
const get = (file: string, how = 'download') => `<a class="button" href="/${file}" ${how}>Get the certificate</a>`;

/** Menus are named as they are from memory; makers move them about, so each step says what to look for. */
export const devices: readonly Device[] = [
  {
    id: 'ipad',
    name: 'iPad or iPhone',
    steps: [
      `Open this page in Safari. ${get('steepfall.crt', '')} Say “Allow” when it asks about a profile.`,
      'Open <b>Settings</b>. Near the top stands <b>Profile Downloaded</b>; if it does not, look under <b>General, VPN &amp; Device Management</b>.',
      `Tap the profile that begins with “Steepfall on”, then <b>More Details</b>. ${compare} Go back and tap <b>Install</b>.`,
      'Go to <b>Settings, General, About</b>, down to <b>Certificate Trust Settings</b>, and switch the certificate on. Without this step nothing changes.',
      'Come back to this page and tap “Look again”.',
    ],
    remove: 'Settings, General, VPN &amp; Device Management, the Steepfall profile, Remove Profile.',
  },
  {
    id: 'android',
    name: 'Android tablet or phone',
    steps: [
      `Open this page in Chrome. ${get('steepfall.crt')} Android only keeps the file; it does not install it from here.`,
      'Open <b>Settings</b> and search for <b>CA certificate</b>. It is mostly under Security, Encryption &amp; credentials, Install a certificate.',
      'Read the warning, choose <b>Install anyway</b>, and pick <b>steepfall.crt</b> from the downloads. The device wants a screen lock for this.',
      `Search the settings for <b>Trusted credentials</b>, open the page “User”, and tap the entry of Steepfall. ${compare} If it differs, remove it there.`,
      'Come back to this page and tap “Look again”. Use Chrome: other browsers may not ask the device whom it trusts.',
    ],
    remove: 'Settings, search for “Trusted credentials”, page “User”, the entry of Steepfall, Remove.',
  },
  {
    id: 'windows',
    name: 'Windows',
    steps: [
      `${get('steepfall.crt')} Open the file.`,
      `On the page “Details” look for the thumbprint. ${compare}`,
      'Choose <b>Install Certificate</b>, then <b>Current User</b>, then <b>Place all certificates in the following store</b>, and pick <b>Trusted Root Certification Authorities</b>.',
      'Windows shows the thumbprint once more and asks; say Yes. Close the browser and open it again.',
      'Come back to this page and press “Look again”.',
    ],
    remove:
      'Run <code>certmgr.msc</code>, Trusted Root Certification Authorities, Certificates, delete the entry that begins with “Steepfall on”.',
  },
  {
    id: 'mac',
    name: 'Mac',
    steps: [
      `${get('steepfall.crt')} Open the file; Keychain Access takes it into the keychain “login”.`,
      `Find the entry that begins with “Steepfall on” and open it. ${compare}`,
      'Unfold <b>Trust</b>, and set “When using this certificate” to <b>Always Trust</b>. Close the window and give your password.',
      'Come back to this page and press “Look again”. Firefox has a list of its own: see Linux.',
    ],
    remove: 'Keychain Access, keychain “login”, delete the entry that begins with “Steepfall on”.',
  },
  {
    id: 'linux',
    name: 'Linux',
    steps: [
      `${get('steepfall.pem')} Compare the <a href="#compare">fingerprint</a>: <code>openssl x509 -in steepfall.pem -noout -fingerprint -sha256</code>`,
      'Chromium and Chrome: Settings, search for <b>certificates</b>, the authorities of this device, Import; or <code>certutil -d sql:$HOME/.pki/nssdb -A -t C,, -n steepfall -i steepfall.pem</code>',
      'Firefox: Settings, search for <b>certificates</b>, View Certificates, Authorities, Import, and tick that it may identify websites.',
      'Programs without a window, on Debian: <code>sudo cp steepfall.pem /usr/local/share/ca-certificates/steepfall.crt &amp;&amp; sudo update-ca-certificates</code>',
      'Come back to this page and press “Look again”.',
    ],
    remove:
      'delete it in the same list, or <code>certutil -d sql:$HOME/.pki/nssdb -D -n steepfall</code>, or remove the file and run <code>sudo update-ca-certificates --fresh</code>.',
  },
];

import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { connect, createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { makeAuthority } from '../src/trust/authority.js';
import { issueCertificate } from '../src/trust/certificate.js';

interface Place {
  folder: string;
  port: number;
  hubPort: number;
}

/** Programs that people put in front of a hub, each with what README tells them to write: those that are on this machine. The set-up of the tests brings Apache. */
export const proxies = [
  {
    name: 'Apache',
    program: '/usr/sbin/apache2',
    args: (file: string) => ['-f', file, '-DFOREGROUND'],
    configuration: ({ folder, port, hubPort }: Place) => `
ServerRoot "${folder}"
ServerName localhost
PidFile "${folder}/pid"
ErrorLog "${folder}/error.log"
Listen 127.0.0.1:${port}
${['mpm_event', 'authz_core', 'proxy', 'proxy_http', 'headers', 'ssl'].map((name) => `LoadModule ${name}_module /usr/lib/apache2/modules/mod_${name}.so`).join('\n')}
${process.getuid?.() === 0 ? 'User www-data\nGroup www-data' : ''}
SSLEngine on
SSLCertificateFile "${folder}/hub.pem"
ProxyPreserveHost On
RequestHeader set X-Forwarded-Proto "https"
ProxyPass / http://127.0.0.1:${hubPort}/ upgrade=websocket
`,
  },
  {
    name: 'nginx',
    program: '/usr/sbin/nginx',
    args: (file: string) => ['-c', file, '-e', 'stderr'],
    configuration: ({ folder, port, hubPort }: Place) => `
daemon off;
pid ${folder}/pid;
error_log stderr;
events {}
http {
  access_log off;
  ${['client_body', 'proxy', 'fastcgi', 'uwsgi', 'scgi'].map((name) => `${name}_temp_path ${folder}/${name};`).join('\n  ')}
  map $http_upgrade $connection_upgrade { default upgrade; '' close; }
  server {
    listen 127.0.0.1:${port} ssl;
    ssl_certificate ${folder}/hub.pem;
    ssl_certificate_key ${folder}/hub.pem;
    client_max_body_size 8m;
    location / {
      proxy_pass http://127.0.0.1:${hubPort};
      proxy_http_version 1.1;
      proxy_set_header Host $http_host;
      proxy_set_header X-Forwarded-For $proxy_add_x_forwarded_for;
      proxy_set_header X-Forwarded-Proto $scheme;
      proxy_set_header Upgrade $http_upgrade;
      proxy_set_header Connection $connection_upgrade;
    }
  }
}
`,
  },
].filter(({ program }) => existsSync(program));

export interface RunningProxy {
  url: string;
  /** Whom its certificate is signed by. */
  ca: string;
  stop: () => Promise<void>;
}

/** Starts it with HTTPS in front of a hub that listens on this machine. */
export async function startProxy(proxy: (typeof proxies)[number], hubUrl: string): Promise<RunningProxy> {
  const folder = mkdtempSync(join(tmpdir(), 'steepfall-proxy-'));
  const machine = { names: ['localhost'], addresses: ['127.0.0.1'] };
  const authority = await makeAuthority(machine, Date.now());
  const { certificate, key } = await issueCertificate(authority, machine, Date.now());
  writeFileSync(join(folder, 'hub.pem'), certificate + key, { mode: 0o600 });
  const port = await freePort();
  const file = join(folder, 'proxy.conf');
  writeFileSync(file, proxy.configuration({ folder, port, hubPort: Number(new URL(hubUrl).port) }));
  const child = spawn(proxy.program, proxy.args(file), { stdio: ['ignore', 'ignore', 'pipe'] });
  let printed = '';
  child.stderr.on('data', (chunk: Buffer) => (printed += chunk.toString()));
  while (!(await isOpen(port))) {
    if (child.exitCode !== null) throw new Error(`${proxy.name} ended with ${child.exitCode}: ${printed}`);
    await sleep(20);
  }
  return {
    url: `https://localhost:${port}`,
    ca: authority.certificate,
    async stop() {
      child.kill('SIGTERM');
      if (child.exitCode === null) await once(child, 'exit');
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

async function freePort(): Promise<number> {
  const listener = createServer().listen(0, '127.0.0.1');
  await once(listener, 'listening');
  const { port } = listener.address() as AddressInfo;
  listener.close();
  await once(listener, 'close');
  return port;
}

function isOpen(port: number): Promise<boolean> {
  return new Promise((told) => {
    const line = connect(port, '127.0.0.1');
    line.once('connect', () => {
      line.destroy();
      told(true);
    });
    line.once('error', () => told(false));
  });
}

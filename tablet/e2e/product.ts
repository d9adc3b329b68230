import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { createServer } from 'node:net';
import { join, resolve } from 'node:path';
import { createConnection } from 'mariadb';
// The launcher is plain JavaScript, since it runs before anything is installed.
import { startMariadb } from '../../hub/launcher/lib/mariadb.mjs';

const root = resolve(import.meta.dirname, '../..');

/** The built product on a throw-away database: hub, sockets and tablet on one port of the loopback address. */
export class Product {
  private hub: ChildProcess | null = null;

  private constructor(
    private readonly mariadb: Awaited<ReturnType<typeof startMariadb>>,
    private readonly dataDir: string,
    readonly port: number,
  ) {}

  static async start(): Promise<Product> {
    const dataDir = await mkdtemp(join(root, '.test-data', 'e2e-'));
    const mariadb = await startMariadb({ dataDir: join(dataDir, 'mariadb'), log: () => {} });
    const product = new Product(mariadb, dataDir, await freePort());
    await product.startHub();
    return product;
  }

  get url(): string {
    return `http://localhost:${this.port}`;
  }

  async startHub(): Promise<void> {
    const hub = spawn(process.execPath, [join(root, 'hub/dist/main.js')], {
      env: {
        ...process.env,
        DATABASE_URL: this.mariadb.url('steepfall'),
        PORT: String(this.port),
        HOST: '127.0.0.1',
        JWT_SECRET: 'a secret of the end-to-end tests, and of nothing else',
        TABLET_DIST: join(root, 'tablet/dist'),
        DEMO: 'on',
        NODE_ENV: 'production',
        LOG_LEVEL: 'warn',
      },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    this.hub = hub;
    let printed = '';
    hub.stderr.on('data', (chunk: Buffer) => (printed += chunk.toString()));
    await new Promise<void>((listening, failed) => {
      hub.stdout.on('data', (chunk: Buffer) => {
        printed += chunk.toString();
        if (printed.includes('hub.listening')) listening();
      });
      hub.once('exit', (code) => failed(new Error(`The hub ended with ${code}.\n${printed}`)));
    });
  }

  async stopHub(signal: NodeJS.Signals = 'SIGTERM'): Promise<void> {
    const hub = this.hub;
    this.hub = null;
    if (!hub || hub.exitCode !== null) return;
    hub.kill(signal);
    await once(hub, 'exit');
  }

  /** Rows as they are on disk, read past the hub. */
  async rows<Row>(sql: string, values: unknown[] = []): Promise<Row[]> {
    return [...((await this.query(sql, values)) as Row[])];
  }

  /** Changes rows past the hub, where no screen and no endpoint does yet. */
  async execute(sql: string, values: unknown[] = []): Promise<void> {
    await this.query(sql, values);
  }

  private async query(sql: string, values: unknown[]): Promise<unknown> {
    const connection = await createConnection(this.mariadb.url('steepfall'));
    try {
      return await connection.query({ sql, bigIntAsNumber: true }, values);
    } finally {
      await connection.end();
    }
  }

  async stop(): Promise<void> {
    await this.stopHub();
    await this.mariadb.stop();
    await rm(this.dataDir, { recursive: true, force: true });
  }
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  await once(server, 'close');
  if (address === null || typeof address === 'string') throw new Error('No free port.');
  return address.port;
}

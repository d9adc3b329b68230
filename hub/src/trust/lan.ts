import type { Server as HttpServer } from 'node:http';
import type { Server as HttpsServer } from 'node:https';
import { hostname, networkInterfaces } from 'node:os';
import type { HubConfig } from '../config/environment.js';
import { createGuideServer, listenGuide } from './guide-server.js';
import { describeMachine, reachableFrom } from './machine.js';
import { keepTrust, renewTrust, type KeptTrust, type Trust } from './trust-folder.js';

/** A machine that moved to another network is in it a minute later. */
const LOOK_EVERY_MS = 60_000;

/** What a person has to know to bring a tablet here. */
export interface LanFacts {
  /** By address first: not every tablet finds a name that ends in `.local`. */
  origins: string[];
  guides: string[];
  sha256: string;
  sha1: string;
  isNewAuthority: boolean;
  outside: string[];
}

type LanConfig = NonNullable<HubConfig['lan']>;

/** HTTPS on the network of the house: the certificates, kept up to date, and the page that helps tablets to trust them. */
export class Lan {
  private server: HttpsServer | null = null;
  private guide: HttpServer | null = null;
  private timer: NodeJS.Timeout | null = null;

  private constructor(
    private readonly config: LanConfig,
    private kept: KeptTrust,
  ) {}

  static async open(config: LanConfig): Promise<Lan> {
    return new Lan(config, await keepTrust(config.folder, thisMachine(), Date.now()));
  }

  get tls(): Trust['tls'] {
    return this.kept.trust.tls;
  }

  /** Once the hub listens: from now on its certificate follows the calendar and the network. */
  async attend(server: HttpsServer, host: string, tabletDist: string | null): Promise<LanFacts> {
    this.server = server;
    const port = (server.address() as { port: number }).port;
    this.guide = createGuideServer({ trust: () => this.kept.trust, httpsPort: () => port, tabletDist });
    const guidePort = await listenGuide(this.guide, this.config.guidePort, host);
    this.timer = setInterval(() => void this.look(), LOOK_EVERY_MS);
    this.timer.unref();
    server.once('close', () => this.close());
    const { trust, isNewAuthority } = this.kept;
    const hosts = reachableFrom(trust.names);
    return {
      origins: hosts.map((name) => `https://${name}:${port}`),
      guides: hosts.map((name) => `http://${name}:${guidePort}`),
      sha256: trust.authority.sha256,
      sha1: trust.authority.sha1,
      isNewAuthority,
      outside: trust.outside,
    };
  }

  private close(): void {
    if (this.timer) clearInterval(this.timer);
    this.guide?.close();
    this.guide?.closeAllConnections();
  }

  /** Renews what has to be renewed; whoever connects from then on gets it, and no line that is open is cut. */
  async look(): Promise<void> {
    try {
      this.kept = await renewTrust(this.config.folder, thisMachine(), Date.now());
    } catch {
      // A full disk or a folder that is gone: the certificate in use goes on, and the next look tries again.
      return;
    }
    if (this.kept.isNewCertificate) this.server?.setSecureContext(this.tls);
  }
}

const thisMachine = () => describeMachine(hostname(), networkInterfaces());

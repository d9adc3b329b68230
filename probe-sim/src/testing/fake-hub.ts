import { createServer, type IncomingMessage, type Server as HttpServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { PushedReadings } from '@steepfall/shared/contracts';
import { problem, type Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import { Server, type Socket } from 'socket.io';

const TOKEN = 'right-token';

/** The device side of a hub, in memory, for specs: it can hang up, lose an answer, be full or be away. */
export class FakeHub {
  readonly token = TOKEN;
  /** Stored once per instant, as the real one does. */
  readonly stored = new Map<number, Reading>();
  pushes = 0;
  /** Clock of the hub, ahead of here by this much. */
  aheadMs = 0;
  /** Stores this many batches without saying so: the line breaks before the answer. */
  answersToLose = 0;
  /** Answers the next batches with these. */
  readonly problems: Problem[] = [];
  #http: HttpServer | null = null;
  #sockets: Server | null = null;
  #port = 0;

  get url(): string {
    return `http://127.0.0.1:${this.#port}`;
  }

  get times(): number[] {
    return [...this.stored.keys()].sort((a, b) => a - b);
  }

  /** Starts, or comes back at the same address. */
  async start(): Promise<void> {
    const http = createServer((request, response) => {
      void this.#answer(request).then((answer) => {
        if (answer === null) return request.socket.destroy();
        response.writeHead(answer.status, {
          'content-type': answer.status < 400 ? 'application/json' : 'application/problem+json',
        });
        response.end(JSON.stringify(answer.body));
      });
    });
    this.#sockets = new Server(http, { transports: ['websocket'] });
    this.#sockets.use((socket, next) => {
      if (socket.handshake.auth['deviceToken'] === TOKEN) return next();
      const data = problem('device-token-unknown', 'It may have been rotated.');
      next(Object.assign(new Error(data.title), { data }));
    });
    this.#sockets.on('connection', (socket: Socket) => {
      socket.on('readings.push', (message: { readings: Reading[] }, ack: (answer: unknown) => void) => {
        const answer = this.#take(message.readings);
        if (answer === null) socket.conn.close();
        else ack('status' in answer ? { problem: answer } : answer);
      });
    });
    await new Promise<void>((resolve) => http.listen(this.#port, '127.0.0.1', resolve));
    this.#port = (http.address() as AddressInfo).port;
    this.#http = http;
  }

  async stop(): Promise<void> {
    this.#http?.closeAllConnections();
    await this.#sockets?.close();
    this.#http = null;
  }

  async #answer(request: IncomingMessage): Promise<{ status: number; body: unknown } | null> {
    const chunks: Buffer[] = [];
    for await (const chunk of request) chunks.push(chunk as Buffer);
    if (request.url === '/api/health') {
      const nowMs = Date.now() + this.aheadMs;
      return { status: 200, body: { status: 'ok', database: 'up', version: '0.1.0', nowMs } };
    }
    if (request.headers.authorization !== `Bearer ${TOKEN}`) {
      return { status: 401, body: problem('device-token-unknown', 'It may have been rotated.') };
    }
    if (request.url === '/api/device/clock') {
      return { status: 200, body: { anchorWallMs: 1000, anchorRunMs: 5000, rate: 30 } };
    }
    const { readings } = JSON.parse(Buffer.concat(chunks).toString()) as { readings: Reading[] };
    const answer = this.#take(readings);
    return answer === null ? null : { status: 'status' in answer ? answer.status : 200, body: answer };
  }

  #take(readings: Reading[]): PushedReadings | Problem | null {
    this.pushes += 1;
    const told = this.problems.shift();
    if (told) return told;
    const fresh = readings.filter((reading) => !this.stored.has(reading.atMs));
    for (const reading of fresh) this.stored.set(reading.atMs, reading);
    if (this.answersToLose > 0) {
      this.answersToLose -= 1;
      return null;
    }
    return { accepted: fresh.length, duplicates: readings.length - fresh.length, refused: [] };
  }
}

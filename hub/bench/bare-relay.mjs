/**
 * The least that hands a reading on: a socket.io server that takes it, sends it to everybody else and acknowledges. Prints its port.
 */
import { createServer } from 'node:http';
import { Server } from 'socket.io';

const http = createServer();
const server = new Server(http, {
  transports: ['websocket'],
  serveClient: false,
  pingInterval: 5_000,
  pingTimeout: 4_000,
});
server.on('connection', (socket) => {
  socket.on(
    'readings.push',
    (/** @type {{ readings: unknown[] }} */ { readings }, /** @type {Function} */ acknowledge) => {
      socket.broadcast.volatile.emit('run.readings', { readings, acceptedMs: Date.now() });
      acknowledge({ accepted: readings.length });
    },
  );
});
http.listen(0, '127.0.0.1', () => {
  const address = /** @type {import('node:net').AddressInfo} */ (http.address());
  process.stdout.write(`${JSON.stringify({ event: 'relay.listening', port: address.port })}\n`);
});

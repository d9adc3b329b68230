// The least that the launcher takes for a hub.
import { createServer } from 'node:http';

const say = (facts) => process.stdout.write(`${JSON.stringify(facts)}\n`);

const server = createServer((_request, response) => response.end('{}'));
server.on('error', (error) => {
  say({
    event: 'hub.failed',
    reason: error.code === 'EADDRINUSE' ? 'port-taken' : 'unexpected',
    detail: error.message,
  });
  process.exit(1);
});
server.listen(Number(process.env['PORT']), process.env['HOST'], () =>
  say({ event: 'hub.listening', port: server.address().port }),
);
process.on('SIGTERM', () => server.close(() => process.exit(0)));

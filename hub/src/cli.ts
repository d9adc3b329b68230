import { readProcessEnvironment } from './config/environment.js';
import { migrateDatabase } from './database/migrate.js';
import { demoSignIns } from './demo/demo-house.js';
import { resetDemo } from './demo/demo.js';

/** Jobs around the hub. Each prints one line of JSON. */
const commands: Record<string, { help: string; run: () => Promise<unknown> }> = {
  'reset-demo': {
    help: 'throws the demo house away and makes it anew (stop the hub first)',
    async run() {
      const { databaseUrl } = readProcessEnvironment();
      await migrateDatabase(databaseUrl);
      await resetDemo(databaseUrl, Date.now());
      return { event: 'demo.reset' };
    },
  },
  'demo-sign-ins': {
    help: 'lists who can sign in to the demo house',
    run: () => Promise.resolve(demoSignIns),
  },
};

const [name = ''] = process.argv.slice(2);
const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
if (command) {
  try {
    process.stdout.write(`${JSON.stringify(await command.run())}\n`);
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    process.stdout.write(`${JSON.stringify({ event: 'command.failed', command: name, detail })}\n`);
    process.exitCode = 1;
  }
} else {
  const lines = Object.entries(commands).map(([title, { help }]) => `  ${title.padEnd(16)}${help}`);
  process.stderr.write(`Usage: node dist/cli.js COMMAND\n\n${lines.join('\n')}\n`);
  process.exitCode = 2;
}

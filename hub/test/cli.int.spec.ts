import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { testEnvironment } from './create-test-app.js';
import { createThrowAwayDatabase, type ThrowAwayDatabase } from './database.js';

const cli = join(import.meta.dirname, '../dist/cli.js');

describe('the commands around the hub', () => {
  let database: ThrowAwayDatabase;
  beforeAll(async () => {
    database = await createThrowAwayDatabase();
  });
  afterAll(() => database.drop());

  async function call(command: string, variables: Record<string, string> = {}) {
    const env = { PATH: process.env['PATH'], ...testEnvironment, DATABASE_URL: database.url, ...variables };
    try {
      return { code: 0, ...(await promisify(execFile)(process.execPath, [cli, command], { env })) };
    } catch (error) {
      return error as { code: number; stdout: string; stderr: string };
    }
  }

  it('make the demo house on an empty database, and again', async () => {
    for (let n = 0; n < 2; n += 1) {
      const { code, stdout } = await call('reset-demo');
      expect([code, JSON.parse(stdout)]).toEqual([0, { event: 'demo.reset' }]);
    }
  });

  it('list the sign-ins', async () => {
    const signIns = JSON.parse((await call('demo-sign-ins')).stdout) as { role: string; password: string }[];
    expect(signIns.map(({ role }) => role)).toEqual(['owner', 'brewer', 'hand', 'taster', 'pourer']);
  });

  it('say what is wrong', async () => {
    const unknown = await call('make-tea');
    expect(unknown).toMatchObject({ code: 2, stdout: '', stderr: expect.stringContaining('Usage') as string });
    const alone = await call('reset-demo', { DATABASE_URL: 'mariadb://u:p@127.0.0.1:1/none' });
    expect(alone.code).toBe(1);
    expect(JSON.parse(alone.stdout)).toMatchObject({ event: 'command.failed', command: 'reset-demo' });
  });
});
